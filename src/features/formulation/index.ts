/** The section in which a formulation is written beside its consequences. */
export { Formulation } from './Formulation.tsx';
