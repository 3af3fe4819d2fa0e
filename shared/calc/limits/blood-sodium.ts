import { above, below, formatNumber } from '../../rounding';
import type { MaintenanceLimit } from '../facts';
import { broken } from '../findings';

/** The last blood sodium before a new order: caution outside 135 to 145, senior outside 130 to 155; NICE NG29. */
export const bloodSodiumLimit: MaintenanceLimit = ({ scene }, found) => {
  const last = scene.request.results.sodium;
  if (last === undefined) return;
  const { serumLowCaution, serumHighCaution, serumLowSenior, serumHighSenior } = scene.rules.tonicity;
  const isLow = below(last.value, serumLowCaution);
  if (!isLow && !above(last.value, serumHighCaution)) return;
  const isSenior = isLow ? below(last.value, serumLowSenior) : above(last.value, serumHighSenior);
  const word = isLow ? 'Low' : 'High';
  const text = `Last blood sodium ${formatNumber(last.value, 0)} mmol/L${isSenior ? ': a senior agrees before a new order.' : '.'}`;
  found.push(
    broken(
      'blood-sodium',
      isSenior ? 'senior' : 'caution',
      [`${word} sodium`, text],
      scene.sources.tonicity.serumLowCaution,
      {
        value: last.value,
        limit: isLow
          ? isSenior
            ? serumLowSenior
            : serumLowCaution
          : isSenior
            ? serumHighSenior
            : serumHighCaution,
        unit: 'mmol/L',
      },
    ),
  );
};
