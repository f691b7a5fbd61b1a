export * from './types';
export { ChemistryError } from './errors';
export { solve } from './equilibrium';
export { colour } from './colour';
export { createSolution, water, indicatorStock, mix, take } from './solution';
export { ENGINE_VERSION } from './version';
