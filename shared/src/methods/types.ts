import type { TemperatureKind } from '@shared/units';

/** A hard physical limit on a value in SI, with the reason that is shown to the person who typed it. */
export interface Bounds {
  min?: number;
  minExclusive?: boolean;
  max?: number;
  maxExclusive?: boolean;
  reason: string;
}

/** One declared input or output of a method; values pass through it in SI. */
export interface MethodPort {
  name: string;
  tex: string;
  label: string;
  unit: string;
  temperature?: TemperatureKind;
  bounds?: Bounds;
  /** SI value taken when nothing is bound; its presence makes the input optional. */
  default?: number;
}

/** Inputs that repeat: port `mass` becomes `mass_1`, `mass_2`, … */
export interface MethodGroup {
  name: string;
  label: string;
  ports: MethodPort[];
  atLeast: number;
  atMost: number;
}

/** One readable line of a proof: the same computation written in the formula syntax of analyses. */
export interface ProofLine {
  name: string;
  tex: string;
  expression: string;
  unit: string;
}

export type MethodResult =
  | { ok: true; outputs: Readonly<Record<string, number>>; warnings: readonly string[] }
  | { ok: false; input?: string; message: string };

/** A published method as the library offers it. */
export interface Method {
  id: string;
  version: string;
  family: string;
  name: string;
  summary: string;
  equation: string;
  inputs: readonly MethodPort[];
  group?: MethodGroup;
  outputs: readonly MethodPort[];
  proof?: readonly ProofLine[];
  /** Proof lines of a method with repeated inputs, for the number of items actually bound. */
  proofFor?: (items: number) => readonly ProofLine[];
  /** Ids of the constants that the method uses; proof lines name them by symbol. */
  constants?: readonly string[];
  validity: string;
  reference: string;
  cautions: readonly string[];
  /** Concept classes in which the method is used. */
  concepts: readonly string[];
  /** Ids of the reference checks that this build's tests pass. */
  checks: readonly string[];
  compute(inputs: Readonly<Record<string, number>>): MethodResult;
}
