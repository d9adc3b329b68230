export * from './downsample.js';
export * from './gaps.js';
export * from './reading.js';
