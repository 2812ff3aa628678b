import type { Command, EditAnswer, EditRequest, Patch, Role, StudyEvent, Verdict } from '@shared/contract';
import {
  applyCommands,
  type EditContext,
  newId,
  type Proof,
  Refusal,
  type Reproof,
  reprove,
  type RowFacts,
  type Study,
  summaryOf,
  verdictRank,
} from '@shared/study';
import { Op, Transaction } from 'sequelize';
import { type IdempotencyKey, rememberAnswer } from '../middleware/idempotency';
import { Membership } from '../models/membership';
import { Person } from '../models/person';
import { type HistoryRow, writeDerived, writeHistory } from './derived-rows';
import { writePatch } from './entity-rows';
import { appendEntry, entriesBetween } from './ledger';
import { refusalProblem } from './refusal-problem';
import { snapshotOf, writeSnapshot } from './snapshot';
import type { Current, StudyStore } from './study-store';

/** Who edits, in which study, with which roles at this moment. */
export interface Editor {
  readonly studyId: string;
  readonly personId: string;
  readonly roles: readonly Role[];
}

export interface EditOptions {
  /** Kept with the answer in the same transaction, so that a repeated request applies nothing. */
  readonly idempotency?: IdempotencyKey;
  /** Only the demonstration's seeder, which writes a history, and system commands set these. */
  readonly at?: Date;
  readonly authority?: 'direct' | 'system';
}

type Moved = StudyEvent['moved'];

/**
 * The one path for every change: under the study's row lock, apply the commands to a fork, re-prove the affected cone,
 * and commit rows, results, verdicts, history and ledger entry as the next revision, or nothing at all. The cache takes
 * the result over only after COMMIT. Throws problems for refusals; nothing is applied then.
 */
export class EditService {
  constructor(private readonly store: StudyStore) {}

  async edit(editor: Editor, request: EditRequest, options: EditOptions = {}): Promise<EditAnswer> {
    const { sequelize } = this.store;
    return this.store.inTurn(editor.studyId, async () => {
      let committed: Current | null = null;
      try {
        const answer = await sequelize.transaction(
          { isolationLevel: Transaction.ISOLATION_LEVELS.READ_COMMITTED },
          async (transaction) => {
            const { current, at } = await this.store.locked(editor.studyId, transaction);
            // Identifiers first, so that the answer can say which command made what.
            const commands = named(
              request.draft === undefined
                ? request.commands
                : [intoDraft(current.proof.study, request.draft, request.commands)],
            );
            const edit = await this.apply(
              current,
              editor,
              commands,
              options.at ?? at,
              options.authority ?? 'direct',
              transaction,
            );
            const next = await this.write(current, editor, request.why, commands, edit, transaction);
            if (options.idempotency)
              await rememberAnswer(transaction, options.idempotency, { status: 200, body: next.answer });
            committed = next.current;
            return { answer: next.answer, publish: edit.publish };
          },
        );
        const proof = answer.publish();
        this.store.publish({ ...(committed as unknown as Current), proof });
        return answer.answer;
      } catch (error) {
        // A connection that broke at COMMIT leaves it open whether the edit holds; the rows will tell.
        if (committed) this.store.forget(editor.studyId);
        throw error instanceof Refusal ? refusalProblem(error) : error;
      }
    });
  }

  private async apply(
    current: Current,
    editor: Editor,
    commands: readonly Command[],
    at: Date,
    authority: 'direct' | 'system',
    transaction: Transaction,
  ): Promise<Applied> {
    const { proof, studyId, revision } = current;
    const fork = proof.study.fork();
    const patches = await this.patchesFor(studyId, commands, transaction);
    const names = await personNames();
    const context: EditContext = {
      actorId: editor.personId,
      roles: editor.roles,
      at: at.toISOString(),
      newId: () => newId(),
      revision: revision + 1,
      authority,
      patchOf: (wanted) => patches.get(wanted) ?? null,
      personName: (id) => names.get(id) ?? 'a former member',
    };
    await refuseStrangers(studyId, commands, transaction);
    applyCommands(fork, commands, context, (requirementId) => factsOf(proof, requirementId));
    let reproof = reprove(proof, fork, fork.patch());
    refuseUnreasonedWorsening(proof, reproof, commands);
    const baseline = fork.patch().find((entry) => entry.kind === 'baseline' && !entry.before);
    let snapshot: { id: string; content: string } | null = null;
    if (baseline?.kind === 'baseline' && baseline.after) {
      const frozen = snapshotOf(provenFork(proof, fork, reproof), revision + 1, baseline.id);
      fork.put('baseline', { ...baseline.after, digest: frozen.digest });
      snapshot = { id: baseline.id, content: frozen.content };
      reproof = reprove(proof, fork, fork.patch());
    }
    const patch = fork.patch();
    return {
      at,
      patch,
      fork,
      reproof,
      snapshot,
      publish: () => {
        proof.study.absorb(patch);
        return reproof.publish();
      },
    };
  }

  private async write(
    current: Current,
    editor: Editor,
    why: string,
    commands: readonly Command[],
    edit: Applied,
    transaction: Transaction,
  ): Promise<{ answer: EditAnswer; current: Current }> {
    const { sequelize } = this.store;
    const { studyId } = current;
    const revision = current.revision + 1;
    await writePatch(studyId, edit.patch, transaction);
    await writeDerived(
      sequelize,
      studyId,
      edit.reproof,
      (id) => edit.fork.get('analysis', id) !== undefined,
      transaction,
    );
    const history = historyOf(current.proof, edit);
    await writeHistory(sequelize, studyId, revision, history, transaction);
    if (edit.snapshot) await writeSnapshot(sequelize, studyId, edit.snapshot.id, edit.snapshot.content, transaction);
    const turned: Moved = history
      .filter((row) => row.was !== row.verdict)
      .map((row) => ({ key: row.key, from: row.was as Verdict | null, to: row.verdict as Verdict | null }));
    const summary = summaryOf(commands, edit.patch, edit.fork);
    const at = edit.at.toISOString();
    const ledgerHead = await appendEntry(
      sequelize,
      studyId,
      {
        revision,
        personId: editor.personId,
        at,
        summary,
        why,
        commands,
        patch: edit.patch,
        moved: turned,
        previous: current.ledgerHead,
      },
      transaction,
    );
    await sequelize.query('UPDATE studies SET revision = $2, ledger_head = $3 WHERE id = $1', {
      bind: [studyId, revision, ledgerHead],
      transaction,
    });
    await sequelize.query("SELECT pg_notify('study_revision', $1)", {
      bind: [JSON.stringify({ studyId, revision })],
      transaction,
    });
    const answer: EditAnswer = {
      revision,
      created: createdBy(commands, edit.patch),
      turned: turned.map(({ key, from, to }) => ({ key, from, to })),
      moved: history.filter((row) => row.was === row.verdict).map((row) => row.key),
      warnings: [],
    };
    return { answer, current: { ...current, revision, ledgerHead, provedAt: at } };
  }

  private async patchesFor(
    studyId: string,
    commands: readonly Command[],
    transaction: Transaction,
  ): Promise<Map<number, { patch: Patch; actorId: string }>> {
    const patches = new Map<number, { patch: Patch; actorId: string }>();
    for (const command of commands) {
      if (command.type !== 'edit.undo') continue;
      const [entry] = await entriesBetween(
        this.store.sequelize,
        studyId,
        command.revision - 1,
        command.revision,
        transaction,
      );
      if (entry) patches.set(command.revision, { patch: entry.patch, actorId: entry.personId });
    }
    return patches;
  }
}

interface Applied {
  readonly at: Date;
  readonly patch: Patch;
  readonly fork: Study;
  readonly reproof: Reproof;
  readonly snapshot: { readonly id: string; readonly content: string } | null;
  readonly publish: () => Proof;
}

/** An edit made while looking at a draft is added to that change request: same way in, other command. */
function intoDraft(study: Study, key: string, commands: readonly Command[]): Command {
  const change = study.byKey('change', key);
  if (!change)
    throw new Refusal('not-found', `There is no change request ${key} in this study.`, {
      field: 'draft',
      value: key,
      expected: 'a change request of this study',
    });
  const edits = commands.map((command) => {
    if (isProcedure(command)) {
      throw new Refusal(
        'invalid',
        `${command.type} is a step of procedure and cannot be proposed in ${key}; look at the study as it is now for that.`,
        { field: 'commands', value: command.type, expected: 'an edit' },
      );
    }
    return command;
  });
  return { type: 'change.amend', id: change.id, version: change.version, edits } as Command;
}

const PROCEDURE =
  /^(requirement\.(submit|return)|analysis\.check|verification\.record|assessment\.|departure\.|change\.|baseline\.|edit\.)/;
function isProcedure(command: Command): boolean {
  return PROCEDURE.test(command.type);
}

/** The derived state of a fork while its edit is being written. */
function provenFork(base: Proof, fork: Study, reproof: Reproof): Proof {
  const proven = new Map(base.proven);
  for (const [id, after] of reproof.changed) {
    if (after) proven.set(id, after);
    else proven.delete(id);
  }
  return { study: fork, model: base.model, proven, uncertain: base.uncertain };
}

function factsOf(proof: Proof, requirementId: string): RowFacts {
  const proven = proof.proven.get(requirementId);
  if (!proven)
    throw new Refusal('not-found', 'There is no such requirement in this study.', {
      field: 'id',
      value: requirementId,
    });
  const departed = proof.study
    .find('departure', 'requirementId', requirementId)
    .some((departure) => departure.state === 'in force');
  return { compliance: proven.computedCompliance, verdict: proven.verdict, digest: proven.digest, departed };
}

/** Approving what turns a verdict for the worse is allowed, and asks the chair for a reason. */
function refuseUnreasonedWorsening(proof: Proof, reproof: Reproof, commands: readonly Command[]): void {
  const approval = commands.find(
    (command) => command.type === 'change.dispose' && command.decision === 'approved' && !command.reason,
  );
  if (!approval) return;
  const worse = [...reproof.changed].flatMap(([id, after]) => {
    const before = proof.proven.get(id);
    return before && after && verdictRank(after.verdict) < verdictRank(before.verdict)
      ? [`${proof.study.get('requirement', id)?.key} from ${before.verdict} to ${after.verdict}`]
      : [];
  });
  if (worse.length > 0) {
    throw new Refusal(
      'invalid',
      `reason: nothing was given; approval turns ${worse.join(', ')}. Say why that is accepted.`,
      { field: 'reason', value: '', expected: 'a reason for accepting the worse verdict' },
    );
  }
}

function historyOf(before: Proof, edit: Applied): HistoryRow[] {
  return [...edit.reproof.changed].flatMap(([id, after]) => {
    const was = before.proven.get(id);
    const same =
      was &&
      after &&
      was.verdict === after.verdict &&
      Object.is(was.margin?.absolute, after.margin?.absolute) &&
      Object.is(was.value, after.value);
    if (same) return [];
    const key = edit.fork.get('requirement', id)?.key ?? before.study.get('requirement', id)?.key ?? id;
    return [
      {
        requirement_id: id,
        key,
        was: was?.verdict ?? null,
        verdict: after?.verdict ?? null,
        value: after?.value ?? null,
        margin: after?.margin?.absolute ?? null,
        percent: after?.margin?.percent ?? null,
      },
    ];
  });
}

/** Commands that create something, with the identifier they will create it under. */
function named(commands: readonly Command[]): readonly Command[] {
  return commands.map((command) =>
    'version' in command || command.type === 'edit.undo' || command.id ? command : { ...command, id: newId() },
  );
}

/** What each creating command made, with the key it got. */
function createdBy(commands: readonly Command[], patch: Patch): EditAnswer['created'] {
  return commands.flatMap((command, index) => {
    if ('version' in command || command.type === 'edit.undo') return [];
    const entry = patch.find((one) => one.id === command.id && !one.before);
    return entry?.after ? [{ command: index, id: entry.id, key: 'key' in entry.after ? entry.after.key : '' }] : [];
  });
}

async function personNames(): Promise<Map<string, string>> {
  const people = await Person.findAll({ attributes: ['id', 'name'], raw: true });
  return new Map(people.map((person) => [person.id, person.name]));
}

/** Refuses to make somebody an owner who has no part in the study. */
async function refuseStrangers(studyId: string, commands: readonly Command[], transaction: Transaction): Promise<void> {
  const named = commands.flatMap((command) => {
    if (command.type !== 'requirement.revise') return [];
    return [command.changes.ownerId, ...(command.changes.coOwnerIds ?? []), command.changes.openItem?.personId].filter(
      (id) => id !== undefined,
    );
  });
  if (named.length === 0) return;
  const members = await Membership.findAll({
    where: { studyId, personId: { [Op.in]: named } },
    attributes: ['personId'],
    raw: true,
    transaction,
  });
  const stranger = named.find((id) => !members.some((member) => member.personId === id));
  if (stranger)
    throw new Refusal('invalid', 'ownerId: that person has no role in this study; choose one of its members.', {
      field: 'ownerId',
      value: stranger,
      expected: 'a member of this study',
    });
}
