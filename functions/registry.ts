import type { Declaration } from './declaration';
import { carryFamily } from './families/carry';
import { combinationFunctions } from './families/combination';
import { coverageFunctions } from './families/coverage';
import { decisionFunctions } from './families/decision';
import { glasswareFunctions } from './families/glassware';
import { precisionFunctions } from './families/precision';
import { proofFunctions } from './families/proof';
import { roundingFunctions } from './families/rounding';
import { significantFigureFunctions } from './families/significantFigures';
import { standardUncertaintyFunctions } from './families/standardUncertainty';

/** Every worksheet function: the single source of truth for metadata, argument checking, help and tables. */
export const registry: readonly Declaration[] = [
  ...standardUncertaintyFunctions,
  ...precisionFunctions,
  ...glasswareFunctions,
  ...combinationFunctions,
  ...carryFamily,
  ...roundingFunctions,
  ...coverageFunctions,
  ...decisionFunctions,
  ...significantFigureFunctions,
  ...proofFunctions,
];
