import { Button } from '@/components/ui/button';
import { checkEntries } from '@shared/checks/entries';
import { workOutOwn } from '@shared/checks/own';
import { formatNumber } from '@shared/rounding';
import type { CheckFormState } from '../forms/use-check-form';

/** What follows from the checker's own entries; nothing until they are all there, and nothing is filled in unasked. */
export function WorkedOut({ check }: { check: CheckFormState }) {
  const { form, context, asked } = check;
  const own = workOutOwn(form, context, asked);
  if (!own.ok) {
    const lacking = checkEntries(asked.kind, asked.shortForm).find(({ field }) => field === own.field);
    return (
      <p className="note mt-s2" role="status">
        {lacking
          ? `Brimline works it out once your own entries are there. Next: ${lacking.label.toLowerCase()}.`
          : own.words}
      </p>
    );
  }
  const { figures } = own;
  if (figures.kind === 'bolus') {
    return (
      <p className="note mt-s2" role="status">
        <b>{formatNumber(figures.mlPerKg, 1)} mL/kg</b>, {formatNumber(figures.percentOfCirculating, 0)}% of
        the circulating volume, from your entries.
      </p>
    );
  }
  const rate = formatNumber(figures.workedOutRate, 1);
  const volume = formatNumber(figures.volume, 1);
  return (
    <p className="mt-s2 flex flex-wrap items-center justify-between gap-s2" role="status">
      <span className="text-small">
        From your entries: <b>{rate} mL/h</b>, {volume} mL
      </span>
      <Button small onClick={() => check.set({ rate, volumeMl: volume, workedOutBy: 'program' })}>
        Take these figures
      </Button>
    </p>
  );
}
