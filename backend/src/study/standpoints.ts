import { parseStandpoint, standpointText, type Standpoint, type Verdict } from '@shared/contract';
import {
  applyCommands,
  inversePatch,
  isOpen,
  newId,
  proveAll,
  proveFork,
  Refusal,
  type Proof,
  type ViewContext,
} from '@shared/study';
import type { Sequelize } from 'sequelize';
import type { SignedInPerson, StudyAccess } from '../middleware/access';
import { Conflict, Forbidden, NotFound } from '../middleware/problems';
import { Person } from '../models/person';
import { entriesBetween } from './ledger';
import { readSnapshot } from './snapshot';
import type { Current, StudyStore } from './study-store';

const MOST_KEPT = 8;

interface Seen {
  readonly proof: Proof;
  readonly revision: number;
  readonly label: string;
  readonly editable: boolean;
  /** Time and ledger head of a baseline, so that its exports say the same whenever they are made. */
  readonly frozen?: { readonly at: string; readonly ledgerHead: string };
}

/**
 * From where a read looks. Now is the cached study; a revision is rebuilt by inverse patches; a baseline is its frozen
 * snapshot; a draft is now with the edits of one change request on an overlay. All of them are the same study type.
 */
export class Standpoints {
  private readonly kept = new Map<string, Proof>();

  constructor(
    private readonly store: StudyStore,
    private readonly sequelize: Sequelize,
  ) {}

  /** Everything that read models need at a standpoint. Throws problems for what does not exist or may not be seen. */
  async context(study: StudyAccess, person: SignedInPerson, text: string): Promise<ViewContext> {
    const standpoint = parseStandpoint(text);
    const current = await this.store.now(study.id);
    const seen = await this.see(current, standpoint, study, person);
    const people = await Person.findAll({ attributes: ['id', 'name'], raw: true });
    return {
      proof: seen.proof,
      people: new Map(people.map((one) => [one.id, one.name])),
      me: { id: person.id, name: person.name },
      roles: study.roles,
      standpoint: {
        text: standpointText(standpoint),
        label: seen.label,
        revision: seen.revision,
        editable: seen.editable,
      },
      revision: current.revision,
      provedAt: seen.frozen?.at ?? current.provedAt,
      ledgerHead: seen.frozen?.ledgerHead ?? current.ledgerHead,
      baseline: await this.baselineInForce(current, seen.revision),
    };
  }

  private async see(
    current: Current,
    standpoint: Standpoint,
    study: StudyAccess,
    person: SignedInPerson,
  ): Promise<Seen> {
    switch (standpoint.kind) {
      case 'now':
        return {
          proof: current.proof,
          revision: current.revision,
          label: `Now · r${current.revision}`,
          editable: true,
        };
      case 'revision':
        return this.seeRevision(current, standpoint.revision);
      case 'baseline':
        return this.seeBaseline(current, standpoint.key);
      case 'draft':
        return this.seeDraft(current, standpoint.key, study, person);
    }
  }

  /** The study as it was at a revision. Throws NotFound for one that has not been made yet. */
  async revisionProof(studyId: string, revision: number): Promise<Proof> {
    return (await this.seeRevision(await this.store.now(studyId), revision)).proof;
  }

  private async seeRevision(current: Current, revision: number): Promise<Seen> {
    if (revision > current.revision)
      throw new NotFound(`There is no revision ${revision} in this study; the newest is ${current.revision}.`);
    const label = `Revision · r${revision}`;
    const name = `${current.studyId} ${revision}`;
    let proof = revision === current.revision ? current.proof : this.kept.get(name);
    if (!proof) {
      const fork = current.proof.study.fork();
      const entries = await entriesBetween(this.sequelize, current.studyId, revision, current.revision);
      for (const entry of entries.reverse()) fork.absorb(inversePatch(entry.patch));
      // Everything the base has meanwhile gained would show through the fork, so the state is copied out of it.
      proof = proveAll(fork.detached());
      this.keep(name, proof);
    }
    return { proof, revision, label, editable: false };
  }

  /** The frozen state of a baseline. Throws NotFound when there is none of that key. */
  async baselineProof(studyId: string, key: string): Promise<{ readonly proof: Proof }> {
    const { proof } = await this.seeBaseline(await this.store.now(studyId), key);
    return { proof };
  }

  private async seeBaseline(current: Current, key: string): Promise<Seen> {
    const baseline = current.proof.study.byKey('baseline', key);
    if (!baseline) throw new NotFound(`There is no baseline ${key} in this study.`);
    const name = `${current.studyId} ${key}`;
    let proof = this.kept.get(name);
    if (!proof) {
      const snapshot = await readSnapshot(this.sequelize, current.studyId, baseline.id);
      if (!snapshot) throw new NotFound(`The content of baseline ${key} is missing.`);
      if (snapshot.digest !== baseline.digest)
        throw new Conflict(`The content of baseline ${key} does not have the digest it was taken with.`);
      proof = snapshot.proof;
      proof.study.put('baseline', baseline);
      this.keep(name, proof);
    }
    const [entry] = await entriesBetween(this.sequelize, current.studyId, baseline.revision - 1, baseline.revision);
    const frozen = { at: baseline.at, ledgerHead: entry?.digest ?? '' };
    return { proof, revision: baseline.revision, label: `Baseline ${key} · ${baseline.name}`, editable: false, frozen };
  }

  private async seeDraft(current: Current, key: string, study: StudyAccess, person: SignedInPerson): Promise<Seen> {
    const change = current.proof.study.byKey('change', key);
    if (!change) throw new NotFound(`There is no change request ${key} in this study.`);
    const board = study.roles.includes('board-member') || study.roles.includes('board-chair');
    if (change.authorId !== person.id && !board)
      throw new Forbidden(`The draft of ${key} is seen by its author and the board.`);
    if (!isOpen(change))
      throw new Conflict(`${key} is ${change.state}; its draft is no longer there. Look at the study as it is now.`);
    const fork = current.proof.study.fork();
    try {
      applyCommands(
        fork,
        change.edits,
        {
          actorId: change.authorId,
          roles: [],
          at: current.provedAt,
          newId: () => newId(),
          revision: current.revision + 1,
          authority: 'proposal',
          patchOf: () => null,
          personName: (id) => id,
        },
        () => {
          throw new Error('a draft holds no assessments');
        },
      );
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      throw new Conflict(`${key} is in conflict with the study as it is now: ${error.message}`);
    }
    const mine = change.authorId === person.id && (change.state === 'draft' || change.state === 'deferred');
    return {
      proof: proveFork(current.proof, fork),
      revision: current.revision,
      label: `Draft ${key} · r${current.revision}`,
      editable: mine,
    };
  }

  private async baselineInForce(current: Current, revision: number): Promise<ViewContext['baseline']> {
    const { study } = current.proof;
    const [newest] = study
      .all('baseline')
      .filter((baseline) => baseline.revision <= revision)
      .sort((a, b) => b.revision - a.revision);
    if (!newest) return null;
    const { proof } = await this.seeBaseline(current, newest.key);
    const verdicts = new Map<string, Verdict>([...proof.proven].map(([id, proven]) => [id, proven.verdict]));
    return { key: newest.key, revision: newest.revision, verdicts };
  }

  private keep(name: string, proof: Proof): void {
    this.kept.set(name, proof);
    for (const oldest of this.kept.keys()) {
      if (this.kept.size <= MOST_KEPT) break;
      this.kept.delete(oldest);
    }
  }
}
