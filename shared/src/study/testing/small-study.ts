import type { Command, CommandOf, Patch, PersonRef, Role, StudySettings } from '@shared/contract';
import { applyCommands, type RowFacts } from '../apply';
import type { EditContext } from '../edit-context';
import { proveAll, type Proof } from '../prove';
import { Study } from '../study';
import { complianceOf } from '../verdict';
import type { ViewContext } from '../views/view-context';

/** Somebody with roles in the small study. */
export interface Somebody extends PersonRef {
  readonly roles: readonly Role[];
}

/** An identifier that reads as what it is numbered by, so that tests can name what commands create. */
export function idOf(number: number): string {
  return `00000000-0000-7000-8000-${String(number).padStart(12, '0')}`;
}

const somebody = (number: number, name: string, ...roles: Role[]): Somebody => ({ id: idOf(number), name, roles });
export const OWNER = somebody(901, 'Ines Okafor', 'requirements-owner');
export const ANALYST = somebody(902, 'Mika Sato', 'analyst');
export const MEMBER = somebody(903, 'Lena Brandt', 'board-member', 'analyst');
export const CHAIR = somebody(904, 'Tomas Reyes', 'board-chair');
export const READER = somebody(905, 'Ada Novak', 'reader');
export const PEOPLE: readonly Somebody[] = [OWNER, ANALYST, MEMBER, CHAIR, READER];

/** Identifiers of what the small study holds. */
export const ID = {
  settings: idOf(1),
  policy: idOf(2),
  vehicle: idOf(10),
  propulsion: idOf(11),
  /** VEH-001, total delta-v at least 38.0 km/s: short margin. */
  deltaV: idOf(20),
  /** VEH-002, initial mass at most 116 t: non-compliant. */
  mass: idOf(21),
  /** PRP-001, outbound demand at most 24.5 km/s, child of VEH-001: no evidence. */
  outbound: idOf(22),
  share: idOf(30),
  isp: idOf(40),
  dry: idOf(41),
  propellant: idOf(42),
  /** AN-001, mass roll-up. */
  rollUp: idOf(50),
  /** AN-002, transfer delta-v, fed by AN-001. */
  transfer: idOf(51),
  deltaVByAnalysis: idOf(60),
  massByAnalysis: idOf(61),
} as const;

const AT = '2026-03-02T09:00:00.000Z';
let next = 100_000;

/** How one person edits directly, at a fixed time; anything can be laid over. */
export function editingAs(person: Somebody, over: Partial<EditContext> = {}): EditContext {
  return {
    actorId: person.id,
    roles: person.roles,
    at: AT,
    newId: () => idOf(next++),
    revision: 1,
    authority: 'direct',
    patchOf: () => null,
    personName: (id) => PEOPLE.find((candidate) => candidate.id === id)?.name ?? id,
    ...over,
  };
}

/** What assessments ask of the derived state, answered by proving the study as it stands. */
export function factsOf(study: Study): (requirementId: string) => RowFacts {
  let proof: Proof | undefined;
  return (requirementId) => {
    proof ??= proveAll(study);
    const proven = proof.proven.get(requirementId)!;
    return {
      compliance: complianceOf(proven.verdict),
      verdict: proven.verdict,
      digest: proven.digest,
      departed: study.find('departure', 'requirementId', requirementId).some(({ state }) => state === 'in force'),
    };
  };
}

/** Applies commands as one person and takes the result over; gives the patch. Throws Refusal and leaves all as it was. */
export function edit(study: Study, person: Somebody, ...commands: readonly Command[]): Patch {
  const fork = study.fork();
  applyCommands(fork, commands, editingAs(person), factsOf(study));
  const patch = fork.patch();
  study.absorb(patch);
  return patch;
}

const SETTINGS: StudySettings = {
  id: ID.settings,
  version: 1,
  key: 'SMALL',
  name: 'Small tug',
  summary: 'A study of three requirements for tests.',
  phase: 'Phase A',
  concept: 'nuclear-electric',
  levels: ['mission', 'vehicle', 'system', 'unit'],
  maturity: 'concept',
  k: 2,
  quorum: 1,
  counters: {},
};

/** A study with its settings and nothing else. */
export function emptyStudy(settings: Partial<StudySettings> = {}): Study {
  const study = new Study();
  study.put('study', { ...SETTINGS, ...settings });
  return study;
}

const REQUIREMENT = {
  rationale: 'For tests.',
  elementId: null,
  parameter: null,
  limit: null,
  openItem: null,
  parentIds: [],
};
/** A command that writes a requirement; what is not given is plain. */
export function requirement(
  fields: Pick<CommandOf<'requirement.create'>, 'id' | 'title'> & Partial<CommandOf<'requirement.create'>>,
): Command {
  return {
    type: 'requirement.create',
    text: `The vehicle shall ${fields.title}.`,
    level: 'vehicle',
    prefix: 'VEH',
    ...REQUIREMENT,
    ...fields,
  };
}

/** A limit as typed: "at most", "116", "t". */
export function limit(
  relation: 'at least' | 'at most' | 'between' | 'equal within',
  text: string,
  unit: string,
  more: Partial<NonNullable<CommandOf<'requirement.create'>['limit']>> = {},
): NonNullable<CommandOf<'requirement.create'>['limit']> {
  return { relation, value: { text, unit }, temperature: 'absolute', condition: '', ...more };
}

/** A command that adds a quantity: symbol, value as typed, unit; the rest is plain. */
export function quantity(
  id: string,
  symbol: string,
  text: string | null,
  unit: string,
  more: Partial<CommandOf<'quantity.create'>> = {},
): Command {
  return {
    type: 'quantity.create',
    id,
    symbol,
    name: symbol,
    kind: null,
    unit,
    temperature: 'absolute',
    value: text === null ? null : { text, unit },
    uncertainty: null,
    basis: 'estimated',
    source: 'for tests',
    elementId: null,
    ...more,
  };
}

/** A command that adds a formula analysis: bindings by name, and its lines as "name = expression" with their units. */
export function formulaAnalysis(
  id: string,
  name: string,
  inputs: CommandOf<'analysis.create'>['inputs'],
  lines: readonly (readonly [line: string, unit: string, label?: string])[],
): Command {
  return {
    type: 'analysis.create',
    id,
    kind: 'formula',
    name,
    purpose: '',
    elementId: null,
    inputs,
    lines: lines.map(([line, unit, label = '']) => {
      const at = line.indexOf('=');
      return { name: line.slice(0, at).trim(), expression: line.slice(at + 1).trim(), unit, label };
    }),
    method: null,
    results: [],
    assumptions: '',
  };
}

/** A command that links an output of an analysis to a requirement. */
export function verifiedBy(
  id: string,
  requirementId: string,
  analysisId: string,
  output: string,
  more: Partial<CommandOf<'verification.link'>> = {},
): Command {
  return {
    type: 'verification.link',
    id,
    requirementId,
    method: 'analysis',
    level: 'vehicle',
    stage: 'qualification',
    gate: '',
    criterion: '',
    analysisId,
    output,
    deciding: false,
    ...more,
  };
}

/**
 * A tug of 65 t dry mass and 55 t propellant with a specific impulse of 6 500 s ± 100 s (k = 2). Delta-v is
 * 9.80665 × 6500 × ln(120/65) = 39 081 m/s. All in preparation, nothing baselined.
 */
export function smallStudy(): Study {
  const study = emptyStudy();
  edit(
    study,
    OWNER,
    {
      type: 'policy.create',
      id: ID.policy,
      parameter: 'delta-v',
      maturity: 'concept',
      percent: 5,
      absolute: null,
      definition: 'per cent of the limit',
      source: 'for tests',
    },
    { type: 'element.create', id: ID.vehicle, key: 'VEH', name: 'Vehicle', parentId: null, description: '' },
    {
      type: 'element.create',
      id: ID.propulsion,
      key: 'PRP',
      name: 'Propulsion',
      parentId: ID.vehicle,
      description: '',
    },
    requirement({
      id: ID.deltaV,
      title: 'provide total delta-v',
      elementId: ID.vehicle,
      parameter: 'delta-v',
      limit: limit('at least', '38.0', 'km/s'),
    }),
    requirement({
      id: ID.mass,
      title: 'keep initial mass in low orbit',
      elementId: ID.vehicle,
      parameter: 'mass',
      limit: limit('at most', '116', 't'),
    }),
    requirement({
      id: ID.outbound,
      title: 'meet the outbound demand',
      prefix: 'PRP',
      level: 'system',
      elementId: ID.propulsion,
      limit: limit('at most', '24.5', 'km/s'),
    }),
    { type: 'trace.link', id: ID.share, parentId: ID.deltaV, childId: ID.outbound },
    { type: 'budget.set', id: ID.deltaV, version: 1, budget: { rule: 'sum', sense: 'demands' } },
    { type: 'budget.adopt', id: ID.share, version: 1 },
  );
  edit(
    study,
    ANALYST,
    quantity(ID.isp, 'I_sp', '6500', 's', {
      name: 'specific impulse',
      kind: 'specific-impulse',
      elementId: ID.propulsion,
      uncertainty: { distribution: 'normal', halfWidth: { text: '100', unit: 's' }, k: 2 },
    }),
    quantity(ID.dry, 'm_dry', '65.0', 't', { name: 'dry mass', kind: 'mass', elementId: ID.vehicle }),
    quantity(ID.propellant, 'm_p', '55.0', 't', { name: 'propellant load', kind: 'mass', elementId: ID.propulsion }),
    formulaAnalysis(
      ID.rollUp,
      'Mass roll-up',
      [
        { name: 'm_dry', from: { quantityId: ID.dry } },
        { name: 'm_p', from: { quantityId: ID.propellant } },
      ],
      [['m_0 = m_dry + m_p', 't', 'initial mass']],
    ),
    formulaAnalysis(
      ID.transfer,
      'Transfer delta-v',
      [
        { name: 'g_0', from: { constant: 'g_0' } },
        { name: 'I_sp', from: { quantityId: ID.isp } },
        { name: 'm_0', from: { analysisId: ID.rollUp, output: 'm_0' } },
        { name: 'm_p', from: { quantityId: ID.propellant } },
      ],
      [
        ['v_e = g_0 * I_sp', 'km/s', 'effective exhaust speed'],
        ['m_f = m_0 - m_p', 't', 'final mass'],
        ['Delta_v = v_e * log(m_0 / m_f)', 'km/s', 'delta-v'],
      ],
    ),
    verifiedBy(ID.deltaVByAnalysis, ID.deltaV, ID.transfer, 'Delta_v'),
    verifiedBy(ID.massByAnalysis, ID.mass, ID.rollUp, 'm_0'),
  );
  return study;
}

/** What a read model is computed from, as one person sees the study now. */
export function viewOf(study: Study, person: Somebody = READER, over: Partial<ViewContext> = {}): ViewContext {
  return {
    proof: proveAll(study),
    people: new Map(PEOPLE.map(({ id, name }) => [id, name])),
    me: { id: person.id, name: person.name },
    roles: person.roles,
    standpoint: { text: 'now', label: 'Now', revision: 7, editable: true },
    revision: 7,
    provedAt: AT,
    ledgerHead: '0'.repeat(64),
    baseline: null,
    ...over,
  };
}
