/**
 * The thermodynamics: from a source text to its properties, their values and derivatives. The
 * verification has an entry of its own, `verification/index.ts`, since it carries a library that
 * a browser that only derives does not need.
 */
export { derive } from './derive.ts';
export { deriveFormulation, type Derived, type DeriveOptions } from './deriveFormulation.ts';
export { evaluate, type EvaluatedValue, type Evaluation } from './evaluate.ts';
export { createModel, type Model } from './model.ts';
export { partialDerivative, NoSuchDerivative } from './partialDerivative.ts';
export { unitOf, unitPerMole } from './catalogue/index.ts';
