// planted: no-restricted-syntax
export const now = new Date();
