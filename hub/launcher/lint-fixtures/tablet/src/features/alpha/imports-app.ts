// planted: boundaries/dependencies
import { shell } from '#app/shell.ts';

export const found = shell;
