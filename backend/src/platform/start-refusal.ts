/** Exit codes of a refused start, one per reason, so that a supervisor can tell them apart. */
export const EXIT_CODES = {
  'configuration-not-valid': 64,
  'demonstration-in-production': 65,
  'default-password': 66,
  'public-address-not-safe': 67,
  'secrets-not-readable': 68,
  'database-not-reachable': 69,
  'database-not-durable': 70,
  'demonstration-data-in-production': 71,
  'port-not-available': 72,
  'mail-not-configured': 73,
} as const;
export type StartRefusalReason = keyof typeof EXIT_CODES;

/** Why the server does not start, in a sentence for the person who starts it. */
export class StartRefusal extends Error {
  constructor(
    readonly reason: StartRefusalReason,
    message: string,
  ) {
    super(message);
    this.name = 'StartRefusal';
  }

  get exitCode(): number {
    return EXIT_CODES[this.reason];
  }
}
