/** Names the edition of the calculation in stored content; a change of any result is a new one. */
export const CALC_VERSION = 'calc-1';
