import type { AnalysisSheet, BindingSource, CommandOf } from '@shared/contract';
import { readMeasureText } from './measure-text';

/** One line as typed, "m_rad = A / 2 * rho_A". `id` tells lines apart while they are edited. */
export interface TypedLine {
  readonly id: number;
  readonly text: string;
  readonly unit: string;
  readonly label: string;
}
export interface TypedInput {
  readonly id: number;
  readonly name: string;
  readonly from: BindingSource;
}
/** A result from outside: number, half-width and document as typed. */
export interface TypedResult {
  readonly id: number;
  readonly name: string;
  readonly label: string;
  readonly value: string;
  readonly halfWidth: string;
  readonly document: string;
}

/** An analysis as it is written: texts, as typed. */
export interface AnalysisText {
  readonly kind: AnalysisSheet['kind'];
  readonly name: string;
  readonly purpose: string;
  readonly elementId: string;
  readonly assumptions: string;
  readonly method: { readonly id: string; readonly version: string } | null;
  readonly inputs: readonly TypedInput[];
  readonly lines: readonly TypedLine[];
  readonly results: readonly TypedResult[];
}
export type AnalysisFields = Omit<CommandOf<'analysis.create'>, 'type' | 'id' | 'kind'>;

/** A line taken apart at its "="; `at` is where the expression starts in the text. */
export interface SplitLine {
  readonly name: string;
  readonly expression: string;
  readonly at: number;
}

/** A new analysis of a kind, with one line or result to begin with. */
export function blank(kind: AnalysisText['kind'], method: AnalysisText['method'] = null): AnalysisText {
  return {
    kind,
    name: '',
    purpose: '',
    elementId: '',
    assumptions: '',
    method,
    inputs: [],
    lines: kind === 'formula' ? [{ id: 1, text: '', unit: '', label: '' }] : [],
    results: kind === 'external' ? [{ id: 1, name: '', label: '', value: '', halfWidth: '', document: '' }] : [],
  };
}

/** An analysis as its sheet has it, to be edited. */
export function textOf(sheet: AnalysisSheet): AnalysisText {
  return {
    kind: sheet.kind,
    name: sheet.name,
    purpose: sheet.purpose,
    elementId: sheet.elementId ?? '',
    assumptions: sheet.assumptions,
    method: sheet.method,
    inputs: sheet.inputs.map(({ name, from }, index) => ({ id: index + 1, name, from })),
    lines: sheet.lines.map(({ name, expression, unit, label }, index) => ({
      id: index + 1,
      text: `${name} = ${expression}`,
      unit,
      label,
    })),
    results: sheet.results.map(({ name, label, value, uncertainty, document }, index) => ({
      id: index + 1,
      name,
      label,
      value: `${value.text} ${value.unit}`.trim(),
      halfWidth: uncertainty === null ? '' : `${uncertainty.halfWidth.text} ${uncertainty.halfWidth.unit}`.trim(),
      document,
    })),
  };
}

/** Takes a typed line apart; without "=" there is no name and everything is expression. */
export function splitLine(text: string): SplitLine {
  const [whole, name] = /^\s*([A-Za-z_][A-Za-z0-9_]*)\s*=(?!=)\s*/.exec(text) ?? [];
  if (whole === undefined || name === undefined) return { name: '', expression: text.trim(), at: indent(text) };
  return { name, expression: text.slice(whole.length).trimEnd(), at: whole.length };
}

/** What has been typed as the fields of a command; empty lines are left out. */
export function fieldsOf(text: AnalysisText): AnalysisFields {
  return {
    name: text.name.trim(),
    purpose: text.purpose.trim(),
    elementId: text.elementId === '' ? null : text.elementId,
    assumptions: text.assumptions.trim(),
    method: text.method === null ? null : { ...text.method },
    inputs: text.inputs.map(({ name, from }) => ({ name: name.trim(), from })),
    lines: text.lines
      .filter(({ text: line }) => line.trim() !== '')
      .map((line) => {
        const { name, expression } = splitLine(line.text);
        return { name, expression, unit: line.unit.trim(), label: line.label.trim() };
      }),
    results: text.results.map((result) => ({
      name: result.name.trim(),
      label: result.label.trim(),
      value: readMeasureText(result.value),
      uncertainty:
        result.halfWidth.trim() === ''
          ? null
          : { distribution: 'normal' as const, halfWidth: readMeasureText(result.halfWidth), k: 2 },
      document: result.document.trim(),
    })),
  };
}

/** Only what differs between two states, so that an edit says what it changes. */
export function changedFields(before: AnalysisText, after: AnalysisText): Partial<AnalysisFields> {
  const [old, now] = [fieldsOf(before), fieldsOf(after)];
  return Object.fromEntries(
    Object.entries(now).filter(
      ([name, value]) => JSON.stringify(value) !== JSON.stringify(old[name as keyof AnalysisFields]),
    ),
  );
}

/** Writes another name wherever the old one stands as a whole word in the lines. */
export function renamedIn(lines: readonly TypedLine[], before: string, after: string): readonly TypedLine[] {
  if (!/^[A-Za-z_]\w*$/.test(before)) return lines;
  const word = new RegExp(`(?<![A-Za-z0-9_])${before}(?![A-Za-z0-9_])`, 'g');
  return lines.map((line) => ({ ...line, text: line.text.replace(word, after) }));
}

/** True when something kept earlier has the shape of a text, so that it can be taken up again. */
export function isAnalysisText(kept: unknown): kept is AnalysisText {
  if (typeof kept !== 'object' || kept === null) return false;
  const text = kept as Partial<Record<keyof AnalysisText, unknown>>;
  return (
    typeof text.name === 'string' &&
    typeof text.kind === 'string' &&
    [text.inputs, text.lines, text.results].every((list) => Array.isArray(list))
  );
}

function indent(text: string): number {
  return text.length - text.trimStart().length;
}
