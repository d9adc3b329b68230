import './lib/require-node.mjs';

import('./lib/start-product.mjs').then(({ startProduct }) => startProduct(process.argv.slice(2)));
