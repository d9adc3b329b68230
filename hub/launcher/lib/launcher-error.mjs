/**
 * Something a person can put right. The message is one sentence that says what is wrong and what to do; it is printed
 * without a stack.
 */
export class LauncherError extends Error {
  /** @override */
  name = 'LauncherError';
}

/**
 * Turns the failures of a disk into the sentence for a person; other errors pass as they are.
 * @param {unknown} error
 * @param {string} path what was to be written
 * @returns {unknown}
 */
export function explainDiskError(error, path) {
  const { code, path: failed } = /** @type {NodeJS.ErrnoException} */ (error);
  switch (code) {
    case 'EACCES':
    case 'EPERM':
    case 'EROFS':
      return new LauncherError(
        `${failed ?? path} cannot be written by this user; make it writable, or start as the user who owns it.`,
      );
    case 'ENOTDIR':
    case 'EEXIST':
      return new LauncherError(`${failed ?? path} cannot be made, for a file is in its place; move that file away.`);
    case 'ENOSPC':
    case 'EDQUOT':
      return new LauncherError(`The disk that holds ${path} is full; free at least 500 MB and start again.`);
    default:
      return error;
  }
}
