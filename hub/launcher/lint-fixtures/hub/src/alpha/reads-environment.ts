// planted: no-restricted-properties
export const port = process.env['PORT'];
