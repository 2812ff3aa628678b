/** Something the person at the terminal can put right: shown as its sentence alone, without a stack. */
export class Refusal extends Error {
  /** @param {string} message @param {number} [exitCode] */
  constructor(message, exitCode = 1) {
    super(message);
    this.name = 'Refusal';
    this.exitCode = exitCode;
  }
}

/** What a failed file operation means to the person at the terminal, or undefined for any other error. @param {unknown} error */
export function fileSystemRefusal(error) {
  const { code, path } = /** @type {NodeJS.ErrnoException} */ (error ?? {});
  switch (code) {
    case 'ENOSPC':
    case 'EDQUOT':
      return new Refusal(
        `The disk is full (writing ${path ?? 'a file'}). Nothing was lost: free some room and start again.`,
      );
    case 'EACCES':
    case 'EPERM':
    case 'EROFS':
      return new Refusal(
        `This account may not write ${path ?? 'a file'}. Name another place: DATA_DIR=/some/where npm start`,
      );
    default:
      return undefined;
  }
}
