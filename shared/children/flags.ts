import { FLAGS, type Flag } from '../calc/types';

export type FlagWords = {
  /** On the chip. */
  label: string;
  /** On the form, beside the box to tick: when the flag belongs. */
  means: string;
};

/** The words of each clinical flag; what a flag does to an order stands with the rules, not here. */
export const FLAG_WORDS: Readonly<Record<Flag, FlagWords>> = {
  'raised-adh': {
    label: 'Raised ADH risk',
    means:
      'Surgery in the last 48 h, chest or brain infection, ventilated, or opioids with vomiting: water is held back.',
  },
  cardiac: { label: 'Heart disease', means: 'Structural heart disease, cardiomyopathy or heart failure.' },
  renal: { label: 'Kidney disease', means: 'Kidney injury or chronic kidney disease.' },
  hepatic: { label: 'Liver disease', means: 'Liver failure or chronic liver disease.' },
  'raised-icp': { label: 'Raised intracranial pressure', means: 'Known or suspected, head injury included.' },
  'severe-malnutrition': {
    label: 'Severe malnutrition',
    means: 'Severe acute malnutrition: fluids by the malnutrition protocol, no diuretic.',
  },
  'low-albumin': {
    label: 'Low albumin or oedema',
    means: 'Nephrotic, protein losing, or swollen with low albumin.',
  },
  dka: { label: 'Diabetic ketoacidosis', means: 'In ketoacidosis now, or treated for it in this stay.' },
  metabolic: { label: 'Metabolic or adrenal', means: 'Must not be without glucose, or needs steroid cover.' },
  'ketogenic-diet': {
    label: 'Ketogenic diet',
    means: 'On the diet as a treatment: no glucose unless a senior agrees.',
  },
  'nil-by-mouth': { label: 'Nil by mouth', means: 'Nothing by mouth or tube.' },
  ceftriaxone: {
    label: 'On ceftriaxone',
    means: 'Given in the last 48 h or planned: no calcium in the same line.',
  },
};

/** The chips of a child, in the order the list of flags has. */
export const flagLabels = (flags: readonly Flag[]): string[] =>
  FLAGS.filter((flag) => flags.includes(flag)).map((flag) => FLAG_WORDS[flag].label);
