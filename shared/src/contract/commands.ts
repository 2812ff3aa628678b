import * as z from 'zod';
import { BASES, BUDGET_RULES, BUDGET_SENSES, COMPLIANCES, VERIFICATION_METHODS } from './vocabulary';
import { LimitInput, MeasureInput, UncertaintyInput } from './measure';

const Id = z.uuid();
/** The version of the entity that the person saw; an edit on a stale version is refused. */
const Seen = z.int().min(1);
const Line = (max: number) => z.string().trim().min(1).max(max);
const Free = (max: number) => z.string().trim().max(max).default('');
const Name = z
  .string()
  .regex(
    /^[A-Za-z][A-Za-z0-9_]{0,39}$/,
    'must start with a letter and hold only letters, digits and _, 40 characters at most',
  );
const Day = z.iso.date();
const Reason = Line(2000);

const created = <T extends string, S extends z.ZodRawShape>(type: T, shape: S) =>
  z.strictObject({ type: z.literal(type), id: Id.optional(), ...shape });
const targeted = <T extends string, S extends z.ZodRawShape>(type: T, shape: S) =>
  z.strictObject({ type: z.literal(type), id: Id, version: Seen, ...shape });

const OpenItemInput = z.strictObject({
  kind: z.enum(['TBR', 'TBD']),
  estimate: Free(200),
  action: Line(500),
  personId: Id,
  due: Day,
  rationale: Free(500),
});
const policyFields = {
  percent: z.number().min(0).max(1000),
  /** Required margin as a difference: for limits of zero and on differences, which have no per cent. */
  absolute: MeasureInput.nullable().default(null),
  definition: Line(300),
  source: Line(300),
};
const BudgetInput = z.strictObject({ rule: z.enum(BUDGET_RULES), sense: z.enum(BUDGET_SENSES) });
const requirementFields = {
  title: Line(200),
  text: Line(2000),
  rationale: Free(4000),
  level: Line(60),
  elementId: Id.nullable().default(null),
  parameter: Line(60).nullable().default(null),
  limit: LimitInput.nullable().default(null),
  openItem: OpenItemInput.nullable().default(null),
};
const quantityFields = {
  symbol: Name,
  name: Line(200),
  kind: Line(60).nullable().default(null),
  unit: z.string().trim().max(40),
  temperature: z.enum(['absolute', 'difference']).default('absolute'),
  value: MeasureInput.nullable().default(null),
  uncertainty: UncertaintyInput.nullable().default(null),
  basis: z.enum(BASES).default('estimated'),
  source: Free(1000),
  elementId: Id.nullable().default(null),
};
const BindingInput = z.strictObject({
  name: Name,
  from: z.union([
    z.strictObject({ quantityId: Id }),
    z.strictObject({ analysisId: Id, output: Name }),
    z.strictObject({ constant: Name }),
  ]),
});
const analysisFields = {
  name: Line(200),
  purpose: Free(2000),
  elementId: Id.nullable().default(null),
  inputs: z.array(BindingInput).max(400).default([]),
  lines: z
    .array(z.strictObject({ name: Name, expression: Line(2000), unit: Free(40), label: Free(200) }))
    .max(100)
    .default([]),
  method: z
    .strictObject({ id: Line(80), version: Line(20) })
    .nullable()
    .default(null),
  results: z
    .array(
      z.strictObject({
        name: Name,
        label: Free(200),
        value: MeasureInput,
        uncertainty: UncertaintyInput.nullable().default(null),
        document: Line(300),
      }),
    )
    .max(100)
    .default([]),
  assumptions: Free(4000),
};
const verificationFields = {
  method: z.enum(VERIFICATION_METHODS),
  level: Free(60),
  stage: Free(60),
  gate: Free(60),
  criterion: Free(1000),
  analysisId: Id.nullable().default(null),
  output: Name.nullable().default(null),
  deciding: z.boolean().default(false),
};
/** The fields of a shape, each of them optional and without its default: only what is given is revised. */
function revising<S extends z.ZodRawShape>(shape: S) {
  const bare = Object.fromEntries(
    Object.entries(shape).map(([name, schema]) => [
      name,
      (schema instanceof z.ZodDefault ? (schema.unwrap() as z.ZodType) : (schema as z.ZodType)).optional(),
    ]),
  );
  return z.strictObject(bare) as unknown as z.ZodType<Partial<z.output<z.ZodObject<S>>>>;
}

/** Commands that change what a study states. A change request may propose any of these. */
export const EDIT_COMMANDS = [
  targeted('study.configure', {
    changes: revising({
      name: Line(120),
      summary: Free(1000),
      phase: Line(60),
      concept: Free(120),
      maturity: Line(40),
      k: z.number().positive().max(10),
      quorum: z.int().min(1).max(50),
    }),
  }),
  created('policy.create', {
    parameter: Line(60),
    maturity: Line(40),
    ...policyFields,
  }),
  targeted('policy.revise', policyFields),
  targeted('policy.remove', {}),
  created('element.create', {
    key: z.string().regex(/^[A-Z][A-Z0-9]{1,7}$/, 'must be 2 to 8 capital letters or digits, such as RAD'),
    name: Line(120),
    parentId: Id.nullable().default(null),
    description: Free(1000),
  }),
  targeted('element.revise', {
    changes: revising({ name: Line(120), parentId: Id.nullable(), description: Free(1000) }),
  }),
  targeted('element.remove', {}),
  created('requirement.create', {
    /** Prefix of the key; the code of the element it is allocated to when absent. */
    prefix: z
      .string()
      .regex(/^[A-Z][A-Z0-9]{1,7}$/)
      .optional(),
    ...requirementFields,
    parentIds: z.array(Id).max(20).default([]),
  }),
  targeted('requirement.revise', {
    changes: revising({ ...requirementFields, ownerId: Id, coOwnerIds: z.array(Id).max(20) }),
  }),
  targeted('requirement.withdraw', { reason: Reason }),
  created('trace.link', { parentId: Id, childId: Id }),
  targeted('trace.unlink', {}),
  targeted('budget.set', { budget: BudgetInput.nullable() }),
  targeted('budget.propose', { share: z.enum(['none', 'proposed']) }),
  targeted('budget.adopt', {}),
  created('quantity.create', quantityFields),
  targeted('quantity.set', {
    value: MeasureInput.nullable(),
    uncertainty: UncertaintyInput.nullable().optional(),
    basis: z.enum(BASES).optional(),
    source: z.string().trim().max(1000).optional(),
  }),
  targeted('quantity.revise', { changes: revising(quantityFields) }),
  targeted('quantity.remove', {}),
  created('analysis.create', { kind: z.enum(['formula', 'method', 'external']), ...analysisFields }),
  targeted('analysis.revise', { changes: revising(analysisFields) }),
  targeted('analysis.remove', {}),
  created('verification.link', { requirementId: Id, ...verificationFields }),
  targeted('verification.revise', { changes: revising(verificationFields) }),
  targeted('verification.unlink', {}),
] as const;

/** Commands of procedure: states, signatures, findings, votes. They are never part of a change request. */
const PROCEDURE_COMMANDS = [
  targeted('requirement.submit', {}),
  targeted('requirement.return', { reason: Reason }),
  targeted('analysis.check', { remark: Free(1000) }),
  targeted('verification.record', { met: z.boolean(), document: Line(300), issue: Line(60), note: Free(2000) }),
  /** `version` is the requirement's; the row of the matrix is that of the requirement. */
  targeted('assessment.lower', { to: z.enum(COMPLIANCES).nullable(), reason: Reason }),
  targeted('assessment.close', { reason: Reason }),
  targeted('assessment.reopen', { reason: Reason }),
  created('departure.request', {
    kind: z.enum(['deviation', 'waiver']),
    class: z.enum(['major', 'minor']),
    requirementId: Id,
    title: Line(200),
    reason: Reason,
    effectivity: Free(300),
    expires: Day.nullable().default(null),
  }),
  targeted('departure.decide', { decision: z.enum(['in force', 'refused']), reason: Reason }),
  targeted('departure.expire', {}),
  targeted('change.revise', { changes: revising({ title: Line(200), reason: Free(4000), due: Day.nullable() }) }),
  targeted('change.drop', { index: z.int().min(0) }),
  targeted('change.rebase', {}),
  targeted('change.submit', {}),
  targeted('change.assess', {}),
  targeted('change.refer', { due: Day.nullable().default(null) }),
  targeted('change.vote', { vote: z.enum(['for', 'against']), remark: Free(2000) }),
  targeted('change.dispose', { decision: z.enum(['approved', 'rejected', 'deferred']), reason: Free(2000) }),
  targeted('change.withdraw', { reason: Reason }),
  created('baseline.take', {
    name: Line(120),
    review: Line(120),
    note: Free(2000),
    /** What becomes baselined and what becomes controlled; what already is stays so. */
    requirementIds: z.array(Id).max(100_000),
    quantityIds: z.array(Id).max(100_000).default([]),
    openItems: z.enum(['listed', 'refused']).default('listed'),
  }),
  z.strictObject({ type: z.literal('edit.undo'), revision: z.int().min(1) }),
] as const;

/** What may be proposed by a change request. */
export const EditCommand = z.discriminatedUnion('type', EDIT_COMMANDS);
export type EditCommand = z.infer<typeof EditCommand>;

const CHANGE_COMMANDS = [
  created('change.write', {
    title: Line(200),
    reason: Free(4000),
    due: Day.nullable().default(null),
    edits: z.array(EditCommand).max(2000).default([]),
  }),
  targeted('change.amend', { edits: z.array(EditCommand).min(1).max(2000) }),
] as const;

/** Everything a person can do to a study, in one union. */
export const Command = z.discriminatedUnion('type', [...EDIT_COMMANDS, ...PROCEDURE_COMMANDS, ...CHANGE_COMMANDS]);
export type Command = z.infer<typeof Command>;
export type CommandType = Command['type'];
export type CommandOf<T extends CommandType> = Extract<Command, { type: T }>;
export const COMMAND_TYPES: readonly CommandType[] = Command.options.map((option) => option.shape.type.value);

/** Body of POST /api/studies/:study/edits. With `draft` the commands are added to that change request instead. */
export const EditRequest = z.strictObject({
  commands: z.array(Command).min(1).max(5000),
  draft: z
    .string()
    .regex(/^CR-\d{3,}$/)
    .optional(),
  /** Why, for the ledger. */
  why: z.string().trim().max(2000).default(''),
});
export type EditRequest = z.infer<typeof EditRequest>;
