export const title = 'Sizing';
