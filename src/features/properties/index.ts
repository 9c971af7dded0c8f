/** The section with the typeset sheet of everything that follows from a version. */
export { Properties } from './Properties.tsx';
