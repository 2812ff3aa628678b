import type { Binding, Command, EditCommand, Quantity, Requirement, Verification } from '@shared/contract';
import { newestVersion } from '@shared/methods';
import type { Names } from './names';
import { limit, measure, uncertainty } from './readings';

/** One phrase of a script: the commands it stands for, once its names are known. */
export type Phrase = (names: Names) => Command[];

const optional = (kind: 'element', name: string | undefined, names: Names): string | null =>
  name === undefined ? null : names.id(kind, name);

/** Settings of the study. */
export const settings =
  (changes: { maturity?: string; quorum?: number; k?: number; phase?: string }): Phrase =>
  (names) => [{ type: 'study.configure', ...names.target('study', ''), changes }];

/** A row of the margin policy at concept maturity. */
export const policy =
  (parameter: string, percent: number, definition: string, source: string): Phrase =>
  (names) => [
    {
      type: 'policy.create',
      id: names.create('policy', parameter),
      parameter,
      maturity: 'concept',
      percent,
      absolute: null,
      definition,
      source,
    },
  ];

/** An element of the product tree. */
export const element =
  (key: string, name: string, parent: string | null, description = ''): Phrase =>
  (names) => [
    {
      type: 'element.create',
      id: names.create('element', key),
      key,
      name,
      parentId: parent === null ? null : names.id('element', parent),
      description,
    },
  ];

interface QuantityWords {
  symbol: string;
  name: string;
  kind?: string;
  /** Value with its unit, which is also the unit of display. Absent: no value yet, then `unit` says the dimension. */
  value?: string;
  unit?: string;
  u?: string;
  basis?: Quantity['basis'];
  source: string;
  element?: string;
  difference?: boolean;
}
/** A quantity under a name of the script. */
export const quantity =
  (name: string, words: QuantityWords): Phrase =>
  (names) => {
    const value = words.value === undefined ? null : measure(words.value);
    return [
      {
        type: 'quantity.create',
        id: names.create('quantity', name),
        symbol: words.symbol,
        name: words.name,
        kind: words.kind ?? null,
        unit: value?.unit ?? words.unit ?? '',
        temperature: words.difference ? 'difference' : 'absolute',
        value,
        uncertainty: words.u === undefined ? null : uncertainty(words.u),
        basis: words.basis ?? 'estimated',
        source: words.source,
        elementId: optional('element', words.element, names),
      },
    ];
  };

/** A new value, and what else changes with it. */
export const set =
  (name: string, value: string, words: { u?: string; basis?: Quantity['basis']; source?: string } = {}): Phrase =>
  (names) => [
    {
      type: 'quantity.set',
      ...names.target('quantity', name),
      value: measure(value),
      ...(words.u === undefined ? {} : { uncertainty: uncertainty(words.u) }),
      ...(words.basis === undefined ? {} : { basis: words.basis }),
      ...(words.source === undefined ? {} : { source: words.source }),
    },
  ];

interface RequirementWords {
  title: string;
  text: string;
  rationale: string;
  level: string;
  element?: string;
  parameter?: string;
  limit?: string;
  condition?: string;
  parents?: readonly string[];
  /** A share of the first parent's budget, adopted at once. */
  share?: boolean;
  budget?: Requirement['budget'];
  open?: { kind: 'TBR' | 'TBD'; estimate: string; action: string; person: string; due: string; rationale: string };
}
/** A requirement under the key it will get, linked below its parents. */
export const requirement =
  (key: string, words: RequirementWords): Phrase =>
  (names) => {
    const id = names.create('requirement', key);
    const commands: Command[] = [
      {
        type: 'requirement.create',
        id,
        prefix: key.slice(0, key.lastIndexOf('-')),
        title: words.title,
        text: words.text,
        rationale: words.rationale,
        level: words.level,
        elementId: optional('element', words.element, names),
        parameter: words.parameter ?? null,
        limit: words.limit === undefined ? null : limit(words.limit, words.condition),
        openItem: words.open ? openItem(words.open, names) : null,
        parentIds: [],
      },
    ];
    for (const parent of words.parents ?? []) {
      commands.push({
        type: 'trace.link',
        id: names.create('trace', `${parent} → ${key}`),
        parentId: names.id('requirement', parent),
        childId: id,
      });
    }
    if (words.budget) commands.push({ type: 'budget.set', ...names.target('requirement', key), budget: words.budget });
    if (words.share)
      commands.push({ type: 'budget.adopt', ...names.target('trace', `${words.parents?.[0]} → ${key}`) });
    return commands;
  };

function openItem(words: NonNullable<RequirementWords['open']>, names: Names) {
  const { person, ...rest } = words;
  return { ...rest, personId: names.person(person) };
}

/** A child's limit as a proposed share of its parent's budget. */
export const propose =
  (parent: string, child: string): Phrase =>
  (names) => [{ type: 'budget.propose', ...names.target('trace', `${parent} → ${child}`), share: 'proposed' }];

/** A new limit of a requirement. */
export const revisedLimit =
  (key: string, text: string, statement: string): Phrase =>
  (names) => [
    {
      type: 'requirement.revise',
      ...names.target('requirement', key),
      changes: { limit: limit(text), text: statement },
    },
  ];

/** Bindings by input name: "isp" is a quantity, "roll-up.m" an output of an analysis, "$sigma" a constant. */
export type Inputs = Readonly<Record<string, string>>;
function bindings(inputs: Inputs, names: Names): Binding[] {
  return Object.entries(inputs).map(([name, source]) => {
    if (source.startsWith('$')) return { name, from: { constant: source.slice(1) } };
    const [analysis, output] = source.split('.');
    if (analysis !== undefined && output !== undefined)
      return { name, from: { analysisId: names.id('analysis', analysis), output } };
    return { name, from: { quantityId: names.id('quantity', source) } };
  });
}

interface AnalysisWords {
  title: string;
  purpose: string;
  element?: string;
  assumptions?: string;
}
function analysis(kind: 'formula' | 'method' | 'external', name: string, words: AnalysisWords, names: Names) {
  return {
    type: 'analysis.create' as const,
    id: names.create('analysis', name),
    kind,
    name: words.title,
    purpose: words.purpose,
    elementId: optional('element', words.element, names),
    inputs: [] as Binding[],
    lines: [] as { name: string; expression: string; unit: string; label: string }[],
    method: null,
    results: [],
    assumptions: words.assumptions ?? '',
  };
}

/** An analysis by formulas; each line is [name, expression, unit, label]. */
export const formula =
  (
    name: string,
    words: AnalysisWords & { inputs: Inputs; lines: readonly (readonly [string, string, string, string])[] },
  ): Phrase =>
  (names) => [
    {
      ...analysis('formula', name, words, names),
      inputs: bindings(words.inputs, names),
      lines: words.lines.map(([line, expression, unit, label]) => ({ name: line, expression, unit, label })),
    },
  ];

/** An analysis by a method of the library, in its newest version. */
export const method =
  (name: string, id: string, words: AnalysisWords & { inputs: Inputs }): Phrase =>
  (names) => {
    const version = newestVersion(id);
    if (!version) throw new Error(`the library has no method ${id}`);
    return [
      { ...analysis('method', name, words, names), inputs: bindings(words.inputs, names), method: { id, version } },
    ];
  };

/** Results brought in from outside. */
export const external =
  (
    name: string,
    words: AnalysisWords & {
      results: readonly { name: string; label: string; value: string; u?: string; document: string }[];
    },
  ): Phrase =>
  (names) => [
    {
      ...analysis('external', name, words, names),
      results: words.results.map((result) => ({
        name: result.name,
        label: result.label,
        value: measure(result.value),
        uncertainty: result.u === undefined ? null : uncertainty(result.u),
        document: result.document,
      })),
    },
  ];

interface VerificationWords {
  method?: Verification['method'];
  stage?: string;
  gate?: string;
  criterion?: string;
}
/** How a requirement is verified: by an output "analysis.output", or planned without one. */
export const verify =
  (key: string, source: string | null, words: VerificationWords = {}): Phrase =>
  (names) => {
    const [analysisName, output] = source?.split('.') ?? [];
    return [
      {
        type: 'verification.link',
        id: names.create('verification', key),
        requirementId: names.id('requirement', key),
        method: words.method ?? 'analysis',
        level: key.startsWith('MIS') || key.startsWith('VEH') ? 'system' : 'equipment',
        stage: words.stage ?? 'qualification',
        gate: words.gate ?? 'concept review',
        criterion: words.criterion ?? '',
        analysisId: analysisName === undefined ? null : names.id('analysis', analysisName),
        output: output ?? null,
        deciding: false,
      },
    ];
  };

/** A finding with its evidence. */
export const record =
  (key: string, met: boolean, document: string, issue: string, note: string): Phrase =>
  (names) => [{ type: 'verification.record', ...names.target('verification', key), met, document, issue, note }];

/** Several phrases as one. */
export const all =
  (...phrases: readonly Phrase[]): Phrase =>
  (names) =>
    phrases.flatMap((phrase) => phrase(names));

/** Edits of a phrase as the content of a change request. */
export function proposal(phrases: readonly Phrase[], names: Names): EditCommand[] {
  return names.proposing(() => phrases.flatMap((phrase) => phrase(names))) as EditCommand[];
}
