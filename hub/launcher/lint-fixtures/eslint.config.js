import { createLintConfig } from '../lint/config.js';

// The same rules over a small tree that imitates the checkout: what is planted here has to be found.
export default createLintConfig({ root: import.meta.dirname, isTyped: false });
