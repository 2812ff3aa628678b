export { checkBounds } from './bounds';
export { METHOD_CHECKS } from './checks';
export type { Check, Given, Provenance } from './checks/check';
export { QUANTITY_KINDS, quantityKind, type QuantityKind } from './kinds';
export { METHODS, methodById, newestVersion } from './registry';
export type { Bounds, Method, MethodGroup, MethodPort, MethodResult, ProofLine } from './types';
