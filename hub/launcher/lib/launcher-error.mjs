/** Something the person at the keyboard can put right: the message is one sentence of what is wrong and one of what to do. */
export class LauncherError extends Error {
  /** @override */
  name = 'LauncherError';
}

/**
 * Words for what the disk refuses.
 *
 * @param {unknown} error
 * @param {string} path
 * @returns {unknown} a LauncherError where the cause is known, the error itself otherwise
 */
export function explainDiskError(error, path) {
  const code = /** @type {NodeJS.ErrnoException} */ (error).code;
  if (code === 'EACCES' || code === 'EPERM' || code === 'EROFS')
    return new LauncherError(
      `${path} cannot be written. Give this user the right to write there, or move the checkout.`,
    );
  if (code === 'ENOSPC')
    return new LauncherError(`The disk is full, so ${path} cannot be written. Make room and start again.`);
  return error;
}
