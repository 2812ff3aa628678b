/** Something the person at the terminal can put right: shown as its sentence alone, without a stack. */
export class Refusal extends Error {
  /** @param {string} message @param {number} [exitCode] */
  constructor(message, exitCode = 1) {
    super(message);
    this.name = 'Refusal';
    this.exitCode = exitCode;
  }
}
