import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { checkEntries, type CheckEntry } from '@shared/checks/entries';
import type { CheckForm } from '@shared/checks/form';
import type { CheckPage } from '@shared/routes/checks';
import type { CheckDraft } from '../api/check-saver';
import { dayTime } from '../forms/chart-words';
import type { CheckFormState } from '../forms/use-check-form';

function wordsOf({ field, control }: CheckEntry, form: CheckForm): string {
  const value = form[field];
  if (value === '') return 'empty';
  if (control.type === 'options')
    return control.options.find((option) => option.value === value)?.label ?? value;
  return control.type === 'decimal' && control.spec.unit ? `${value} ${control.spec.unit}` : value;
}

type MovedFiguresProps = { page: CheckPage; check: CheckFormState; theirs: CheckDraft };

/** One's own figures changed in another tab: both are shown, and nothing is overwritten before a choice. */
export function MovedFigures({ page, check, theirs }: MovedFiguresProps) {
  const { form, asked, saver } = check;
  const differing = checkEntries(asked.kind, asked.shortForm).filter(
    ({ field }) => form[field] !== theirs.form[field],
  );
  const take = (chosen: CheckForm) => {
    check.set(chosen);
    saver.settle(theirs, chosen);
  };
  const keptAt =
    theirs.savedAt === null ? '' : ` The other tab’s were kept at ${dayTime(theirs.savedAt, page.zone)}.`;
  return (
    <InlinePanel
      title="Your figures were changed in another tab"
      tone="ochre"
      aboveBar
      closeLabel="Look at this page first"
      onClose={() => document.getElementById('main')?.focus()}
      actions={
        <>
          <Button kind="primary" onClick={() => take(form)}>
            Go on with this page
          </Button>
          <Button onClick={() => take(theirs.form)}>Take the other tab’s</Button>
        </>
      }
    >
      <p>Both are yours and both are shown; nothing is sent until you choose.{keptAt}</p>
      <table className="cmp">
        <caption className="vh">Entries that differ</caption>
        <thead>
          <tr>
            <th scope="col">Entry</th>
            <th scope="col">
              <b>On this page</b>
            </th>
            <th scope="col">
              <b>In the other tab</b>
            </th>
          </tr>
        </thead>
        <tbody>
          {differing.map((entry) => (
            <tr key={entry.field}>
              <th scope="row">{entry.label}</th>
              <td>{wordsOf(entry, form)}</td>
              <td>{wordsOf(entry, theirs.form)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </InlinePanel>
  );
}
