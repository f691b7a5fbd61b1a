export * from './types.ts';
export { ChemistryError } from './errors.ts';
export { carbonateOf, pHOf, solve } from './equilibrium.ts';
export { bufferCapacity } from './capacity.ts';
export { colour } from './colour.ts';
export { createSolution, indicatorStock, mix, seal, take, water } from './solution.ts';
export { ENGINE_VERSION } from './version.ts';
