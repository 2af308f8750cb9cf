export const order = 1;
