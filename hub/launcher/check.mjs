import './lib/require-node.mjs';

import('./lib/run-checks.mjs').then(({ runChecks }) => runChecks());
