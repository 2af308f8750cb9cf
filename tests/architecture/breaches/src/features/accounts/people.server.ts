export const people = ['Ines'];
