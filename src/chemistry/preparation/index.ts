/** Preparation of real solutions: kept apart from the engine's index, so that a bench in the browser need not carry it. */
export { catalogue, factsFor, type SubstanceFacts } from '../data/substanceFacts.ts';
export { hazardsOf, type Hazards, type LegalHazard } from './hazards.ts';
export { hydrateFormula, molarMass } from './molarMass.ts';
export { dilute, sensible, volumeToMake, weigh, type Dilution, type Weighing } from './recipe.ts';
export { massPercentOf, molarityOf, solutionDensity } from './strength.ts';
export { pHUncertainty, relativeUncertainty, type Measured } from './uncertainty.ts';
