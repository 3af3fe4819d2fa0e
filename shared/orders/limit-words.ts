/** Limits whose name says nothing that a checker may not know: the chart shows it anyway. */
const CHART_LIMITS: Readonly<Record<string, string>> = {
  'weight-old': 'Age of the weight',
  'weight-estimated': 'Estimated weight',
  'blood-sodium': 'Blood sodium',
  'bolus-total': 'Boluses of 24 h',
  'bolus-advice': 'Named advice',
  'malnutrition-fluid': 'Severe malnutrition',
  'dka-fluid': 'Diabetic ketoacidosis',
};

/** A limit in words for a list that people read before they may see the order. */
export const coveredLimitWords = (code: string): string => CHART_LIMITS[code] ?? 'A limit of this order';
