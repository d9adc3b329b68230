/** What the shell is told. */
export const exitCode = {
  done: 0,
  unexpected: 1,
  /** An option, a file or a fault that cannot be used. */
  usage: 2,
  /** The hub does not take anything from this device. */
  refused: 3,
  /** The hub was away, and readings are lost with this process. */
  undelivered: 4,
} as const;
export type ExitCode = (typeof exitCode)[keyof typeof exitCode];

/** Ends a command with a sentence for people. */
export class CommandError extends Error {
  override readonly name = 'CommandError';
  constructor(
    message: string,
    readonly code: ExitCode,
  ) {
    super(message);
  }
}
