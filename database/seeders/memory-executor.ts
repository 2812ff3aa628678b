import { Command, type EditAnswer, type StudySettings } from '@shared/contract';
import { applyCommands, newId, proveAll, Study, type Proof, type RowFacts } from '@shared/study';
import type { EditOptions, Membership, SeedExecutor, StudyOpening } from './script';

interface Held {
  study: Study;
  proof: Proof;
  revision: number;
  readonly memberships: readonly Membership[];
  /** Requirements whose verdict turned, by revision. */
  readonly turned: Map<number, readonly string[]>;
}

/** Plays scripts on studies in memory, through the same commands, rules and proofs as the server. For tests. */
export class MemoryExecutor implements SeedExecutor {
  readonly studies = new Map<string, Held>();
  private readonly people = new Map<string, string>();

  async createStudy(opening: StudyOpening, memberships: readonly Membership[]): Promise<void> {
    const study = new Study();
    const settings: StudySettings = {
      ...opening,
      id: newId(),
      version: 1,
      levels: ['mission', 'vehicle', 'system', 'unit'],
      maturity: 'concept',
      k: 2,
      quorum: 1,
      counters: {},
    };
    study.put('study', settings);
    this.studies.set(opening.key, { study, proof: proveAll(study), revision: 0, memberships, turned: new Map() });
    await Promise.resolve();
  }

  async edit(studyKey: string, actorEmail: string, commands: Command[], { at }: EditOptions): Promise<EditAnswer> {
    const held = this.held(studyKey);
    const fork = held.study.fork();
    const context = {
      actorId: await this.personId(actorEmail),
      roles: held.memberships.find((member) => member.email === actorEmail)?.roles ?? [],
      at: at.toISOString(),
      newId,
      revision: held.revision + 1,
      authority: 'direct' as const,
      patchOf: () => null,
      personName: (id: string) => id,
    };
    applyCommands(
      fork,
      commands.map((command) => Command.parse(command)),
      context,
      (id) => factsOf(held.proof, id),
    );
    const before = held.proof;
    held.study.absorb(fork.patch());
    held.proof = proveAll(held.study);
    held.revision += 1;
    const turned = [...held.proof.proven.values()].flatMap(({ requirementId, verdict }) => {
      const from = before.proven.get(requirementId)?.verdict;
      const key = held.study.get('requirement', requirementId)?.key;
      return from === undefined || key === undefined || from === verdict ? [] : [{ key, from, to: verdict }];
    });
    held.turned.set(
      held.revision,
      turned.map(({ key }) => key),
    );
    return { revision: held.revision, created: [], turned, moved: [], warnings: [] };
  }

  read(studyKey: string): Promise<Study> {
    return Promise.resolve(this.held(studyKey).study);
  }

  personId(email: string): Promise<string> {
    const known = this.people.get(email) ?? newId();
    this.people.set(email, known);
    return Promise.resolve(known);
  }

  held(studyKey: string): Held {
    const held = this.studies.get(studyKey);
    if (!held) throw new Error(`there is no study ${studyKey}`);
    return held;
  }
}

function factsOf(proof: Proof, requirementId: string): RowFacts {
  const proven = proof.proven.get(requirementId);
  if (!proven) throw new Error('the row of a requirement that is not proven');
  const departed = proof.study
    .find('departure', 'requirementId', requirementId)
    .some(({ state }) => state === 'in force');
  return { compliance: proven.compliance, verdict: proven.verdict, digest: proven.digest, departed };
}
