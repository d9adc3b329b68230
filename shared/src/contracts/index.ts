export * from './api.js';
export * from './follow.js';
export * from './learned.js';
export * from './roles.js';
export * from './sockets.js';
