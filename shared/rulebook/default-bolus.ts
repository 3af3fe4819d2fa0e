import { MEMORY, NG29, number, OURS, PRACTICE, section } from './entry';
import type { Certainty } from './document';

const HIGHLAND: [string, Certainty] = ['MSF and NHS Highland', 'read'];
const IRISH: [string, Certainty] = ["Irish paediatric formulary, Perth Children's Hospital", 'read'];
const CENTRAL: [string, Certainty] = ["Perth Children's Hospital", 'read'];
const RCH: [string, Certainty] = ["Royal Children's Hospital Melbourne", 'read'];
const KOLETZKO: [string, Certainty] = ['Koletzko', 'read'];

export const bolus = section('Bolus for shock', {
  childMlPerKg: number(10, 'mL/kg', [5, 20], 'Proposed dose', NG29),
  carefulMlPerKg: number(5, 'mL/kg', [2, 10], 'Proposed dose with heart, kidney or albumin trouble', NG29),
  newbornMlPerKg: number(10, 'mL/kg', [5, 20], 'Proposed dose, newborn', NG29),
  cautionMlPerKg: number(10, 'mL/kg', [5, 20], 'Caution above, from 28 days', NG29),
  overMinutes: number(10, 'min', [5, 30], 'Given over at most, else caution', NG29),
  brimMlPerKg: number(20, 'mL/kg', [5, 20], 'Brim of one dose by weight', NG29),
  brimMl: number(500, 'mL', [100, 500], 'Brim of one dose', PRACTICE),
  totalSenior: number(40, 'mL/kg/24 h', [20, 60], 'All boluses of 24 h: senior from', NG29),
  totalAdvice: number(60, 'mL/kg/24 h', [40, 80], 'All boluses of 24 h: a named advice above', NG29),
  totalHours: number(24, 'h', [24, 24], 'Boluses count for', NG29),
  pumpMost: number(999, 'mL/h', [99, 1200], 'A pump runs at most', PRACTICE),
  minutesMost: number(60, 'min', [10, 120], 'Longer than this is no bolus: brim', OURS),
});

export const circulating = section('Circulating volume', {
  newborn: number(85, 'mL/kg', [60, 100], 'Term newborn', ['textbook range', 'read']),
  infant: number(75, 'mL/kg', [60, 100], 'Under 1 year', ['textbook range', 'read']),
  child: number(72, 'mL/kg', [60, 100], 'To 12 years', ['textbook range', 'read']),
  older: number(68, 'mL/kg', [60, 100], 'From 12 years', ['textbook range', 'read']),
  infantUntilYears: number(1, 'years', [1, 1], 'Infant means younger than', ['textbook range', 'read']),
  childUntilYears: number(12, 'years', [10, 14], 'Child means younger than', ['textbook range', 'read']),
});

export const potassium = section('Potassium', {
  peripheralMost: number(40, 'mmol/L', [20, 60], 'Concentration by peripheral line: brim above', HIGHLAND),
  peripheralPerKg: number(0.2, 'mmol/kg/h', [0.1, 0.5], 'All fluids, peripheral: brim above', IRISH),
  peripheralPerHour: number(10, 'mmol/h', [5, 20], 'All fluids, peripheral: brim above', IRISH),
  centralPerKg: number(0.5, 'mmol/kg/h', [0.2, 0.5], 'All fluids, central: senior up to, then brim', CENTRAL),
  centralPerHour: number(20, 'mmol/h', [10, 20], 'All fluids, central: senior up to, then brim', MEMORY),
  bagAbove: number(5, 'mmol/L', [5, 10], 'A potassium bag carries more than', OURS),
  serumSenior: number(5.5, 'mmol/L', [5, 6], 'Blood potassium: senior above', RCH),
  serumBrim: number(6, 'mmol/L', [5.5, 6.5], 'Blood potassium: brim above', RCH),
  resultHours: number(24, 'h', [4, 24], 'A potassium result counts for', RCH),
  newbornHours: number(24, 'h', [24, 72], 'Newborn: none before', RCH),
});

export const glucose = section('Glucose', {
  newbornCaution: number(12, 'mg/kg/min', [6, 13], 'Newborn: caution above', KOLETZKO),
  newbornLeast: number(3, 'mg/kg/min', [0, 6], 'Newborn, nil by mouth: caution below', KOLETZKO),
  infantCaution: number(8, 'mg/kg/min', [4, 13], '28 days to 2 years: caution above', KOLETZKO),
  infantLeast: number(2, 'mg/kg/min', [0, 6], '28 days to 2 years, nil by mouth: caution below', MEMORY),
  brim: number(13, 'mg/kg/min', [8, 15], 'To 2 years: brim above', MEMORY),
  untilYears: number(2, 'years', [1, 5], 'Rate lines hold until', KOLETZKO),
  noneUnderYears: number(1, 'years', [1, 5], 'Fluid without glucose: caution under', PRACTICE),
  peripheralPercent: number(12.5, '%', [10, 12.5], 'By peripheral line: brim above', ['Leeds', 'read']),
});

export const osmolarity = section('Osmolarity of the mixture', {
  peripheralSenior: number(900, 'mOsm/L', [600, 900], 'By peripheral line: senior above', [
    'ASPEN 2014',
    'read',
  ]),
  peripheralBrim: number(1000, 'mOsm/L', [800, 1000], 'By peripheral line: brim above', [
    'ASPEN 2014',
    'read',
  ]),
});
