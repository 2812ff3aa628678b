import { ENTITY_KINDS } from '@shared/contract';
import type { EntityKind, EntityKinds } from '@shared/contract';
import { canonicalJson, digestText, type Proof, type Proven, Study, modelOf, uncertainInputs } from '@shared/study';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { derivedOutcomes } from './derived-rows';

/** The frozen content of a baseline: everything entered, everything derived, and the method versions it rests on. */
interface Snapshot {
  readonly study: string;
  readonly revision: number;
  readonly entities: { readonly [K in EntityKind]?: readonly EntityKinds[K][] };
  readonly proven: readonly Proven[];
  readonly results: Readonly<Record<string, { readonly value: number | null; readonly failure: object | null }>>;
  readonly methods: readonly string[];
}

/** Canonical text of a baseline's content and its digest. The baseline being taken is not part of it: it holds the digest. */
export function snapshotOf(proof: Proof, revision: number, baselineId: string): { content: string; digest: string } {
  const entities = Object.fromEntries(
    ENTITY_KINDS.map((kind) => [
      kind,
      (proof.study.all(kind) as readonly { id: string }[]).filter((entity) => entity.id !== baselineId),
    ]),
  );
  const methods = proof.study
    .all('analysis')
    .flatMap((analysis) => (analysis.method ? [`${analysis.method.id} ${analysis.method.version}`] : []));
  const content = canonicalJson({
    study: proof.study.settings.key,
    revision,
    entities,
    proven: [...proof.proven.values()].sort((a, b) => (a.requirementId < b.requirementId ? -1 : 1)),
    results: Object.fromEntries(derivedOutcomes(proof)),
    methods: [...new Set(methods)].sort(),
  });
  return { content, digest: digestText(content) };
}

/** Stores the content of a baseline, in the transaction that takes it. */
export async function writeSnapshot(
  sequelize: Sequelize,
  studyId: string,
  baselineId: string,
  content: string,
  transaction: Transaction,
): Promise<void> {
  await sequelize.query('INSERT INTO baseline_snapshots (study_id, baseline_id, content) VALUES ($1, $2, $3)', {
    bind: [studyId, baselineId, content],
    transaction,
  });
}

/** A baseline as it was frozen: its entities, and its verdicts as they were derived then. Null when there is none. */
export async function readSnapshot(
  sequelize: Sequelize,
  studyId: string,
  baselineId: string,
): Promise<{ proof: Proof; digest: string } | null> {
  const [row] = await sequelize.query<{ content: string }>(
    'SELECT content FROM baseline_snapshots WHERE study_id = $1 AND baseline_id = $2',
    {
      bind: [studyId, baselineId],
      type: QueryTypes.SELECT,
    },
  );
  if (!row) return null;
  const snapshot = JSON.parse(row.content) as Snapshot;
  const study = new Study();
  for (const kind of ENTITY_KINDS) for (const entity of snapshot.entities[kind] ?? []) study.put(kind, entity);
  const proven = new Map(snapshot.proven.map((one) => [one.requirementId, one]));
  return {
    proof: { study, model: modelOf(study), proven, uncertain: uncertainInputs(study) },
    digest: digestText(row.content),
  };
}
