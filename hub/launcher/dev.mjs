import './lib/require-node.mjs';

import('./lib/start-development.mjs').then(({ startDevelopment }) => startDevelopment());
