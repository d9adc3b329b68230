import './lib/require-node.mjs';

import('./lib/run-tests.mjs').then(({ runTests }) => runTests(process.argv.slice(2)));
