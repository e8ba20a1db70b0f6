/** The part of the page’s script that works the derivation and sets its formulas: fetched when it comes into view. */

export { derive } from '@/engine/derivation';
export { setStep } from './set-step';
export { setTex } from './tex';
