import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';

/** Where servers live on Debian; the path of an ordinary user leaves these out. */
const systemFolders = ['/usr/sbin', '/usr/local/sbin', '/sbin'];

/**
 * The full path of a program, or null.
 * @param {readonly string[]} names the first one found wins
 */
export function findProgram(names) {
  const folders = [...(process.env['PATH'] ?? '').split(delimiter).filter(Boolean), ...systemFolders];
  for (const name of names)
    for (const folder of folders) {
      const path = join(folder, name);
      try {
        accessSync(path, constants.X_OK);
        return path;
      } catch {
        // Not here; the next folder may have it.
      }
    }
  return null;
}
