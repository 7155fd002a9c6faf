// Must be refused: what both ends promise each other knows neither of them.
export { Refusal } from '../server/errors.ts';
