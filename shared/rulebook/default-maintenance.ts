import { MAINTENANCE_METHODS } from '../calc/types';
import { choice, HOLLIDAY, MEMORY, NG29, number, OURS, PRACTICE, section, WHO } from './entry';

const perKg: [number, number] = [1, 200];
const share: [number, number] = [1, 100];

export const scope = section('Who Brimline works for', {
  untilYears: number(16, 'years', [16, 18], 'Refused from this birthday', OURS),
});

export const maintenance = section('Maintenance', {
  method: choice('bands-daily', MAINTENANCE_METHODS, 'Method proposed from 28 days', HOLLIDAY),
  firstMlPerKg: number(100, 'mL/kg/24 h', perKg, 'First band, per day', HOLLIDAY),
  secondMlPerKg: number(50, 'mL/kg/24 h', perKg, 'Second band, per day', HOLLIDAY),
  restMlPerKg: number(20, 'mL/kg/24 h', perKg, 'Rest, per day', HOLLIDAY),
  firstHourly: number(4, 'mL/kg/h', [0.1, 10], 'First band, per hour', ['teaching texts, 4-2-1', 'read']),
  secondHourly: number(2, 'mL/kg/h', [0.1, 10], 'Second band, per hour', ['teaching texts, 4-2-1', 'read']),
  restHourly: number(1, 'mL/kg/h', [0.1, 10], 'Rest, per hour', ['teaching texts, 4-2-1', 'read']),
  firstBandKg: number(10, 'kg', [1, 30], 'First band holds', HOLLIDAY),
  secondBandKg: number(10, 'kg', [1, 30], 'Second band holds', HOLLIDAY),
  ceilingBoys: number(2500, 'mL/24 h', [500, 2500], 'Ceiling for boys, other intake included', NG29),
  ceilingGirls: number(2000, 'mL/24 h', [500, 2500], 'Ceiling for girls, other intake included', NG29),
  aboveMethodSteps: number(1, 'pump steps', [0, 10], 'Typed rate above the method: senior beyond', OURS),
  aboveMethodTimes: number(1.5, '×', [1, 2], 'Typed rate above the method: brim beyond', OURS),
  hoursMost: number(24, 'h', [1, 24], 'An order lives at most', NG29),
  allFluidsPercent: number(150, '% of full', [100, 200], 'All fluids together: senior above', OURS),
  keepOpenSmall: number(1, 'mL/h', [0, 2], 'Keep-vein-open rate, lighter children', PRACTICE),
  keepOpenLarge: number(3, 'mL/h', [0, 5], 'Keep-vein-open rate, others', PRACTICE),
  keepOpenSmallBelow: number(10, 'kg', [5, 20], 'Lighter children weigh less than', PRACTICE),
});

export const who = section('WHO method', {
  firstMlPerKg: number(100, 'mL/kg/24 h', perKg, 'First 10 kg', WHO),
  secondMlPerKg: number(50, 'mL/kg/24 h', perKg, 'Next 10 kg', WHO),
  restMlPerKg: number(25, 'mL/kg/24 h', perKg, 'Above 20 kg', WHO),
  feverFrom: number(37, '°C', [36, 38], 'Fever counts above', WHO),
  feverPercent: number(10, '% per °C', [0, 15], 'More for each degree of fever', WHO),
  temperatureLeast: number(30, '°C', [20, 35], 'A temperature is at least', OURS),
  temperatureMost: number(43, '°C', [41, 45], 'A temperature is at most', OURS),
});

const daily: [number, number] = [20, 200];
export const newborn = section('Term newborn, by hours since birth', {
  day1Low: number(50, 'mL/kg/24 h', daily, 'Under 24 h, from', NG29),
  day1High: number(60, 'mL/kg/24 h', daily, 'Under 24 h, to', NG29),
  day2Low: number(70, 'mL/kg/24 h', daily, 'Under 48 h, from', NG29),
  day2High: number(80, 'mL/kg/24 h', daily, 'Under 48 h, to', NG29),
  day3Low: number(80, 'mL/kg/24 h', daily, 'Under 72 h, from', NG29),
  day3High: number(100, 'mL/kg/24 h', daily, 'Under 72 h, to', NG29),
  day4Low: number(100, 'mL/kg/24 h', daily, 'Under 96 h, from', NG29),
  day4High: number(120, 'mL/kg/24 h', daily, 'Under 96 h, to', NG29),
  day5Low: number(120, 'mL/kg/24 h', daily, 'To 28 days, from', NG29),
  day5High: number(150, 'mL/kg/24 h', daily, 'To 28 days, to', NG29),
  brim: number(180, 'mL/kg/24 h', [150, 200], 'Brim', NG29),
});

export const fraction = section('Fraction of full maintenance', {
  raisedAdh: choice('two-thirds', ['four-fifths', 'two-thirds', 'half'], 'Proposed with raised ADH', [
    "Royal Children's Hospital Melbourne",
    'read',
  ]),
  raisedAdhLow: number(50, '%', share, 'Raised ADH: usual from', NG29),
  raisedAdhHigh: number(80, '%', share, 'Raised ADH: usual to', NG29),
});

export const tonicity = section('Sodium in the fluid and in the blood', {
  isotonicFrom: number(130, 'mmol/L', [120, 140], 'Isotonic from', NG29),
  hypertonicAbove: number(154, 'mmol/L', [154, 160], 'Hypertonic above: brim', OURS),
  leastSodium: number(77, 'mmol/L', [30, 130], 'From 28 days: brim below', ['NPSA 2007/22', 'secondary']),
  hypotonicSodium: number(138, 'mmol/L', [135, 145], 'Hypotonic fluid: brim when the last sodium is below', [
    'Canadian Paediatric Society 2013',
    'read',
  ]),
  sodiumFreshHours: number(24, 'h', [4, 24], 'Hypotonic fluid: sodium no older than', NG29),
  isotonicFromDays: number(8, 'days', [0, 28], 'Isotonic fluid asked for from', MEMORY),
  noSodiumHours: number(48, 'h', [0, 96], 'Newborn: glucose without sodium before', [
    "Royal Children's Hospital Melbourne",
    'read',
  ]),
  newbornSodiumLow: number(30, 'mmol/L', [0, 77], 'Newborn to 8 days: usual sodium from', NG29),
  newbornSodiumHigh: number(77, 'mmol/L', [30, 154], 'Newborn to 8 days: usual sodium to', NG29),
  serumLowCaution: number(135, 'mmol/L', [125, 140], 'Blood sodium: caution below', NG29),
  serumHighCaution: number(145, 'mmol/L', [140, 155], 'Blood sodium: caution above', NG29),
  serumLowSenior: number(130, 'mmol/L', [120, 135], 'Blood sodium: senior below', NG29),
  serumHighSenior: number(155, 'mmol/L', [145, 165], 'Blood sodium: senior above', NG29),
  ceftriaxoneDays: number(28, 'days', [28, 365], 'Calcium with ceftriaxone: brim to this age', [
    'FDA',
    'read',
  ]),
});
