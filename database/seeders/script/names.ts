import type { EntityKind } from '@shared/contract';
import { newId, type Study } from '@shared/study';

/**
 * Symbolic names of a script and the identifiers behind them, with the version that the next command on each will see.
 * Identifiers are made in order, one a millisecond, because entities are listed in order of identifier.
 */
export class Names {
  private readonly ids = new Map<string, string>();
  private clock = 0;
  private raised = new Map<string, number>();

  constructor(
    private readonly people: ReadonlyMap<string, string>,
    private study: Study | null = null,
  ) {}

  /** Starts a batch of commands on the study as it now is. */
  begin(study: Study, at: Date): void {
    this.study = study;
    this.clock = Math.max(this.clock, at.getTime());
    this.raised = new Map();
  }

  /** A new identifier for something that this command creates. */
  create(kind: EntityKind, name: string): string {
    const label = `${kind} ${name}`;
    if (this.ids.has(label)) throw new Error(`the script creates ${label} twice`);
    const id = newId(this.clock++);
    this.ids.set(label, id);
    this.raised.set(id, 1);
    return id;
  }

  /** The identifier behind a name used earlier. */
  id(kind: EntityKind, name: string): string {
    const id = this.ids.get(`${kind} ${name}`);
    if (!id) throw new Error(`the script names ${kind} ${name} before it exists`);
    return id;
  }

  /** Target of a command that raises the version: identifier and the version it sees. */
  target(kind: EntityKind, name: string): { id: string; version: number } {
    const seen = this.seen(kind, name);
    this.raised.set(seen.id, seen.version + 1);
    return seen;
  }

  /** Target of a command that leaves the version as it is. */
  seen(kind: EntityKind, name: string): { id: string; version: number } {
    const id = kind === 'study' ? this.current().settings.id : this.id(kind, name);
    const version = this.raised.get(id) ?? this.current().get(kind, id)?.version;
    if (version === undefined) throw new Error(`the script edits ${kind} ${name}, which is not in the study`);
    return { id, version };
  }

  /** Runs a proposal: its edits see the study's versions, and leave those of the batch alone. */
  proposing<T>(write: () => T): T {
    const outside = this.raised;
    this.raised = new Map();
    try {
      return write();
    } finally {
      this.raised = outside;
    }
  }

  /** Identifier of a person by mail address. */
  person(email: string): string {
    const id = this.people.get(email);
    if (!id) throw new Error(`the script names ${email}, who takes no part`);
    return id;
  }

  /** All names of a kind, in order of creation. */
  all(kind: EntityKind): string[] {
    return [...this.ids.keys()]
      .filter((label) => label.startsWith(`${kind} `))
      .map((label) => label.slice(kind.length + 1));
  }

  private current(): Study {
    if (!this.study) throw new Error('the script has not begun');
    return this.study;
  }
}
