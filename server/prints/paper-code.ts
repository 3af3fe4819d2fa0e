import { randomBytes } from 'node:crypto';

const ALPHABET = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ234567';

/** 100 random bits as 20 letters and digits that are not mistaken for each other. */
export const newPaperCode = (): string => Array.from(randomBytes(20), (byte) => ALPHABET[byte & 31]).join('');
