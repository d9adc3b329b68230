// planted: no-restricted-properties
export const nowMs = Date.now();
