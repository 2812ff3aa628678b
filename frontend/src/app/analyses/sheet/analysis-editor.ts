import { Injectable, computed, signal } from '@angular/core';
import type { AnalysisSheet, BindingSource } from '@shared/contract';
import { type ProblemError } from '../../core/http/problem-error';
import type { MethodView } from '../analyses-api';
import {
  type AnalysisText,
  type TypedInput,
  type TypedLine,
  type TypedResult,
  blank,
  renamedIn,
  textOf,
} from '../text/analysis-text';
import { checkLines } from '../text/check-lines';
import { type Source, freeName, sourceId } from '../text/sources';

/** The analysis that is being written on this sheet: what is typed, and what the engine says of it. */
@Injectable()
export class AnalysisEditor {
  readonly text = signal<AnalysisText>(blank('formula'));
  /** What stands on the server, as the text was filled from it; null for a new one. */
  readonly base = signal<{ readonly id: string; readonly version: number; readonly text: AnalysisText } | null>(null);
  readonly sources = signal<readonly Source[]>([]);
  readonly methods = signal<readonly MethodView[]>([]);
  readonly problem = signal<ProblemError | null>(null);
  /** True when it may be changed from here. */
  readonly isOpen = signal(false);

  private readonly saved = computed(() =>
    JSON.stringify(this.base()?.text ?? blank(this.text().kind, this.text().method)),
  );
  readonly isDirty = computed(() => JSON.stringify(this.text()) !== this.saved());
  private readonly byId = computed(() => new Map(this.sources().map((source) => [sourceId(source.from), source])));
  readonly inputs = computed(() =>
    this.text().inputs.map((input) => ({ ...input, source: this.byId().get(sourceId(input.from)) })),
  );
  readonly checked = computed(() => checkLines(this.text().lines, this.inputs()));
  readonly method = computed<MethodView | undefined>(() => {
    const pinned = this.text().method;
    return this.methods().find((method) => method.id === pinned?.id && method.version === pinned.version);
  });

  /** Fills the sheet from the server, throwing away what was typed. */
  fill(sheet: AnalysisSheet): void {
    const text = textOf(sheet);
    this.text.set(text);
    this.base.set({ id: sheet.id, version: sheet.version, text });
    this.problem.set(null);
  }

  set(changes: Partial<AnalysisText>): void {
    this.text.update((text) => ({ ...text, ...changes }));
  }

  setLine(id: number, changes: Partial<TypedLine>): void {
    this.set({ lines: this.text().lines.map((line) => (line.id === id ? { ...line, ...changes } : line)) });
  }

  /** Adds an empty line below another, or at the end, and returns its id. */
  addLine(below?: number): number {
    const lines = this.text().lines;
    const id = nextId(lines);
    const at = below === undefined ? lines.length : lines.findIndex((line) => line.id === below) + 1;
    this.set({ lines: [...lines.slice(0, at), { id, text: '', unit: '', label: '' }, ...lines.slice(at)] });
    return id;
  }

  removeLine(id: number): void {
    this.set({ lines: this.text().lines.filter((line) => line.id !== id) });
  }

  moveLine(id: number, by: -1 | 1): void {
    const lines = [...this.text().lines];
    const at = lines.findIndex((line) => line.id === id);
    const [line] = lines.splice(at, 1);
    if (line === undefined) return;
    lines.splice(Math.max(0, at + by), 0, line);
    this.set({ lines });
  }

  /** Binds another input, under its symbol or under the name that a line asks for. */
  addInput(source: Source, name?: string): void {
    const inputs = this.text().inputs;
    const taken = new Set([...inputs.map((input) => input.name), ...this.checked().map((line) => line.name)]);
    this.set({
      inputs: [...inputs, { id: nextId(inputs), name: name ?? freeName(source.symbol, taken), from: source.from }],
    });
  }

  /** Binds the input of a method, or binds it to something else. */
  bind(name: string, from: BindingSource): void {
    const inputs = this.text().inputs;
    const isBound = inputs.some((input) => input.name === name);
    this.set({
      inputs: isBound
        ? inputs.map((input) => (input.name === name ? { ...input, from } : input))
        : [...inputs, { id: nextId(inputs), name, from }],
    });
  }

  /** Gives an input another name, in the lines as well. */
  renameInput(input: TypedInput, name: string): void {
    if (name === input.name) return;
    this.set({
      inputs: this.text().inputs.map((one) => (one.id === input.id ? { ...one, name } : one)),
      lines: renamedIn(this.text().lines, input.name, name),
    });
  }

  removeInput(name: string): void {
    this.set({ inputs: this.text().inputs.filter((input) => input.name !== name) });
  }

  setResult(id: number, changes: Partial<TypedResult>): void {
    this.set({ results: this.text().results.map((one) => (one.id === id ? { ...one, ...changes } : one)) });
  }

  addResult(): void {
    const results = this.text().results;
    this.set({
      results: [...results, { id: nextId(results), name: '', label: '', value: '', halfWidth: '', document: '' }],
    });
  }

  removeResult(id: number): void {
    this.set({ results: this.text().results.filter((one) => one.id !== id) });
  }
}

function nextId(list: readonly { readonly id: number }[]): number {
  return Math.max(0, ...list.map(({ id }) => id)) + 1;
}
