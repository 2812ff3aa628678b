import type { Binding, BindingSource, EntityKind, EntityKinds, Patch } from '@shared/contract';
import { ENTITY_KINDS } from '@shared/contract';
import { Study } from '@shared/study';
import { Op, type Transaction } from 'sequelize';
import type { ModelStatic } from 'sequelize';
import { Study as StudyRow } from '../models/study';
import * as rows from '../models/study-rows';

type StoredKind = Exclude<EntityKind, 'study'>;
interface TableOf {
  readonly model: ModelStatic<never>;
  /** Entity fields with a column of their own. */
  readonly columns: readonly string[];
}

/** Which table holds which kind, and which fields are columns; everything else is the body. */
const TABLES = {
  policy: { model: rows.PolicyRow, columns: ['parameter', 'maturity'] },
  element: { model: rows.ElementRow, columns: ['key', 'parentId'] },
  requirement: { model: rows.RequirementRow, columns: ['key', 'state', 'elementId', 'ownerId'] },
  trace: { model: rows.TraceRow, columns: ['parentId', 'childId', 'share'] },
  quantity: { model: rows.QuantityRow, columns: ['key', 'state', 'elementId', 'ownerId'] },
  analysis: { model: rows.AnalysisRow, columns: ['key', 'kind', 'elementId', 'authorId'] },
  verification: { model: rows.VerificationRow, columns: ['requirementId', 'analysisId', 'output'] },
  assessment: { model: rows.AssessmentRow, columns: ['requirementId'] },
  departure: { model: rows.DepartureRow, columns: ['key', 'requirementId', 'state', 'expires'] },
  change: { model: rows.ChangeRequestRow, columns: ['key', 'state', 'authorId'] },
  baseline: { model: rows.BaselineRow, columns: ['key', 'digest'] },
} as unknown as Readonly<Record<StoredKind, TableOf>>;

const STORED_KINDS = ENTITY_KINDS.filter((kind): kind is StoredKind => kind !== 'study');

/** Anything with the fields of a row; rows are read raw, and the tables above say what is in them. */
type Raw = Record<string, unknown>;

function rowOf(studyId: string, kind: StoredKind, entity: EntityKinds[StoredKind]): Raw {
  const { id, version, ...rest } = entity as unknown as Raw;
  const row: Raw = { studyId, id, version };
  const body: Raw = {};
  for (const [name, value] of Object.entries(rest)) (TABLES[kind].columns.includes(name) ? row : body)[name] = value;
  if (kind === 'quantity') row['si'] = (entity as EntityKinds['quantity']).value?.si ?? null;
  if (kind === 'baseline') row['takenAtRevision'] = (entity as EntityKinds['baseline']).revision;
  // Bindings have a table of their own, whose foreign keys keep what they name in place.
  if (kind === 'analysis') delete body['inputs'];
  return { ...row, body };
}

function entityOf(kind: StoredKind, row: Raw): EntityKinds[StoredKind] {
  const entity: Raw = { id: row['id'], version: row['version'], ...(row['body'] as Raw) };
  for (const name of TABLES[kind].columns) entity[name] = row[name];
  return entity as unknown as EntityKinds[StoredKind];
}

function bindingRow(studyId: string, analysisId: string, binding: Binding, position: number): Raw {
  const from: Partial<{ quantityId: string; analysisId: string; output: string; constant: string }> = binding.from;
  return {
    studyId,
    analysisId,
    position,
    name: binding.name,
    quantityId: from.quantityId ?? null,
    sourceAnalysisId: from.analysisId ?? null,
    sourceOutput: from.output ?? null,
    constant: from.constant ?? null,
  };
}

function bindingOf(row: Raw): Binding {
  const from = row['quantityId']
    ? { quantityId: row['quantityId'] }
    : row['sourceAnalysisId']
      ? { analysisId: row['sourceAnalysisId'], output: row['sourceOutput'] }
      : { constant: row['constant'] };
  return { name: row['name'] as string, from: from as BindingSource };
}

interface Writable {
  bulkCreate(records: readonly Raw[], options: object): Promise<unknown>;
  destroy(options: object): Promise<number>;
  findAll(options: object): Promise<unknown>;
}
const writable = (model: unknown): Writable => model as Writable;

/** Writes what a patch changed, in the transaction of the edit. */
export async function writePatch(studyId: string, patch: Patch, transaction: Transaction): Promise<void> {
  for (const entry of patch) {
    if (entry.kind !== 'study' || !entry.after) continue;
    const { name, version, ...settings } = entry.after;
    await StudyRow.update({ name, version, settings }, { where: { id: studyId }, transaction });
  }
  for (const kind of STORED_KINDS) {
    const { model, columns } = TABLES[kind];
    const mine = patch.filter((entry) => entry.kind === kind);
    const gone = mine.filter((entry) => entry.after === null).map((entry) => entry.id);
    const kept = mine.flatMap((entry) => (entry.after ? [entry.after as EntityKinds[StoredKind]] : []));
    if (gone.length > 0) await writable(model).destroy({ where: { studyId, id: { [Op.in]: gone } }, transaction });
    if (kept.length === 0) continue;
    const extra = kind === 'quantity' ? ['si'] : kind === 'baseline' ? ['takenAtRevision'] : [];
    await writable(model).bulkCreate(
      kept.map((entity) => rowOf(studyId, kind, entity)),
      { updateOnDuplicate: ['version', 'body', ...columns, ...extra], returning: false, transaction },
    );
    if (kind === 'analysis') await writeBindings(studyId, kept as EntityKinds['analysis'][], transaction);
  }
}

async function writeBindings(
  studyId: string,
  analyses: readonly EntityKinds['analysis'][],
  transaction: Transaction,
): Promise<void> {
  await rows.BindingRow.destroy({
    where: { studyId, analysisId: { [Op.in]: analyses.map((analysis) => analysis.id) } },
    transaction,
  });
  const bindings = analyses.flatMap((analysis) =>
    analysis.inputs.map((binding, position) => bindingRow(studyId, analysis.id, binding, position)),
  );
  if (bindings.length > 0) await writable(rows.BindingRow).bulkCreate(bindings, { returning: false, transaction });
}

/** Reads the whole study from its rows, at one point in time when a transaction is given. */
export async function readStudy(studyId: string, transaction?: Transaction): Promise<Study | null> {
  const settings = await StudyRow.findByPk(studyId, { transaction });
  if (!settings) return null;
  const study = new Study();
  study.put('study', {
    ...(settings.settings as unknown as EntityKinds['study']),
    id: settings.id,
    key: settings.key,
    name: settings.name,
    version: settings.version,
  });
  const bindings = new Map<string, Binding[]>();
  const bindingRows = (await writable(rows.BindingRow).findAll({
    where: { studyId },
    order: ['analysisId', 'position'],
    raw: true,
    transaction,
  })) as Raw[];
  for (const row of bindingRows) {
    const list = bindings.get(row['analysisId'] as string) ?? [];
    list.push(bindingOf(row));
    bindings.set(row['analysisId'] as string, list);
  }
  for (const kind of STORED_KINDS) {
    const found = (await writable(TABLES[kind].model).findAll({ where: { studyId }, raw: true, transaction })) as Raw[];
    for (const row of found) {
      const entity = entityOf(kind, row);
      study.put(kind, (kind === 'analysis' ? { ...entity, inputs: bindings.get(entity.id) ?? [] } : entity) as never);
    }
  }
  return study;
}
