import { createLintConfig } from './hub/launcher/lint/config.js';

export default createLintConfig({ root: import.meta.dirname });
