export * from './calibration.js';
export * from './downsample.js';
export * from './gaps.js';
export * from './lag-test.js';
export * from './reading.js';
export * from './steady.js';
