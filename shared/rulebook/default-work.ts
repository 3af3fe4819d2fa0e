import { choice, number, OURS, PRACTICE, section } from './entry';
import type { Certainty } from './document';

const GROWTH: [string, Certainty] = ['growth references, WHO and CDC', 'read'];
const TO_VERIFY: [string, Certainty] = ['ours, to verify', 'ours'];
const FORMULA: [string, Certainty] = ['age formulas for weight', 'read'];

export const pump = section('Pumps and volumes', {
  stepLow: number(0.1, 'mL/h', [0.1, 1], 'Pump step, lower rates', PRACTICE),
  stepHigh: number(1, 'mL/h', [0.1, 5], 'Pump step, higher rates', PRACTICE),
  stepFrom: number(100, 'mL/h', [10, 1000], 'Higher rates begin at', PRACTICE),
  volumeStep: number(1, 'mL', [0.1, 5], 'Volume step', PRACTICE),
  smallVolumeStep: number(0.1, 'mL', [0.1, 1], 'Volume step, small volumes', PRACTICE),
  smallVolumeBelow: number(10, 'mL', [1, 50], 'Small volumes are below', PRACTICE),
  bagHours: number(4, 'h', [1, 8], 'Volume to be infused: at most this long', PRACTICE),
  bagHoursNewborn: number(2, 'h', [1, 4], 'Volume to be infused, newborn: at most this long', PRACTICE),
});

export const weight = section('Weight', {
  freshDays: number(7, 'days', [1, 14], 'Last measured weight: senior when older', PRACTICE),
  freshHoursNewborn: number(48, 'h', [12, 72], 'Last measured weight, newborn: senior when older', PRACTICE),
  dueHours: number(24, 'h', [12, 48], 'On running fluids: weigh again after', ['NICE NG29', 'read']),
  lifeDivisor: number(2, '÷', [1, 4], 'Order life is divided by this on an estimated or old weight', OURS),
  zCaution: number(3, 'z', [2, 3], 'z-score: caution and second measurement beyond', GROWTH),
  zStop: number(5, 'z', [3, 5], 'z-score: no order without a second person beyond', GROWTH),
  lookalikeInside: number(2, 'z', [1, 3], 'Looks like pounds or a slipped point when inside', OURS),
  lookalikeYears: number(6, 'years', [2, 10], 'Look-alikes are sought harder from', OURS),
  lookalikeZYounger: number(3, 'z', [2, 3], 'Look-alike asked about beyond, younger', OURS),
  lookalikeZOlder: number(2, 'z', [1, 3], 'Look-alike asked about beyond, older', OURS),
  agreesDays: number(30, 'days', [7, 90], 'A measured weight agrees for', OURS),
  agreesPercent: number(10, '%', [5, 15], 'Weights agree within', OURS),
  changePercent: number(10, '%', [5, 15], 'Change in 7 days: second measurement beyond', OURS),
  changeDays: number(7, 'days', [3, 14], 'Change is looked at for', OURS),
  estimateUntilYears: number(13, 'years', [8, 13], 'Age formulas end at', FORMULA),
});

export const check = section('Independent check', {
  weightPercent: number(1, '%', [0, 2], 'Weight may differ by', OURS),
  smallWeightBelow: number(5, 'kg', [2, 10], 'Small children weigh less than', OURS),
  smallWeightKg: number(0.02, 'kg', [0, 0.05], 'Weight of small children may differ by', OURS),
  intakePercent: number(1, '%', [0, 5], 'Other intake may differ by', OURS),
  intakeMl: number(1, 'mL', [0, 10], 'Other intake may differ by, at least', OURS),
  figurePercent: number(1, '%', [0, 2], 'Rate and volume may differ by', OURS),
  figureSteps: number(1, 'steps', [0, 2], 'Rate and volume may differ by, at least', OURS),
  corridorPercent: number(10, '%', [5, 20], 'The other published method: shown beyond', OURS),
  dueRoutine: number(60, 'min', [15, 240], 'Routine check due in', TO_VERIFY),
  dueUrgent: number(20, 'min', [5, 60], 'Urgent check due in', TO_VERIFY),
  dueEmergency: number(5, 'min', [1, 15], 'Emergency check due in', TO_VERIFY),
  agreedUnsigned: number(15, 'min', [5, 60], 'Agreed and not signed: held for', TO_VERIFY),
  remindAt: number(25, '% of time', [5, 90], 'Reminder at', PRACTICE),
  secondAt: number(50, '% of time', [10, 95], 'Second eligible checker at', PRACTICE),
  seniorAt: number(75, '% of time', [15, 99], 'Senior at', PRACTICE),
  telephoneAt: number(100, '% of time', [20, 200], 'Telephone task to the author at', PRACTICE),
  againAfter: number(10, 'min', [0, 60], 'The same checker again after', TO_VERIFY),
  besideMinutes: number(10, 'min', [5, 30], 'Beside me is open for', TO_VERIFY),
  peopleRoutine: number(2, 'people', [2, 4], 'People needed, routine', PRACTICE),
  peopleHighRisk: number(3, 'people', [2, 4], 'People needed, high risk', PRACTICE),
  countersignMinutes: number(60, 'min', [15, 240], 'Emergency countersignature due in', PRACTICE),
  telephoneHours: number(12, 'h', [1, 24], 'Telephone exception countersigned within', PRACTICE),
});

export const windows = section('How long things hold', {
  startHours: number(6, 'h', [1, 24], 'Signed order starts within', TO_VERIFY),
  startHoursBolus: number(2, 'h', [0.5, 6], 'Signed bolus starts within', TO_VERIFY),
  holdHours: number(1, 'h', [0.25, 4], 'One hold lasts at most', TO_VERIFY),
  draftHours: number(24, 'h', [12, 72], 'Untouched draft is discarded after', TO_VERIFY),
});

export const risk = section('High risk', {
  potassiumAbove: number(20, 'mmol/L', [5, 40], 'Potassium in the bag: high risk above', OURS),
  newborn: choice('yes', ['yes', 'no'], 'Newborn: high risk', OURS),
  senior: choice('yes', ['yes', 'no'], 'A senior has to agree: high risk', OURS),
  weightZ: number(3, 'z', [2, 5], 'z-score of the dosing weight: high risk beyond', OURS),
  witness: choice('high-risk', ['never', 'high-risk', 'always'], 'A witness at the bedside', PRACTICE),
});

export const pharmacist = section('Pharmacist', {
  verify: choice('never', ['never', 'high-risk', 'always'], 'A pharmacist verifies', OURS),
  hoursFrom: number(8, 'o’clock', [0, 23], 'Pharmacy opens', OURS),
  hoursTo: number(18, 'o’clock', [1, 24], 'Pharmacy closes', OURS),
});
