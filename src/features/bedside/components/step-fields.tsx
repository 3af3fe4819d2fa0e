import { Choice } from '@/components/ui/choice';
import { DateTimeField } from '@/components/ui/date-time-field';
import { Glyph } from '@/components/ui/glyph';
import { NumberField } from '@/components/ui/number-field';
import { SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';
import { LINE_CLASSES, type LineClass } from '@shared/calc/types';
import type { BedsideEntries, BedsidePage, StepVerdict } from '@shared/routes/bedside';
import { findingOf } from './step-frame';

type FieldsProps<Entries> = {
  entries: Entries;
  verdict: StepVerdict | undefined;
  enter: (changes: Partial<Entries>) => void;
  /** Leaving the last field compares the step. */
  onLast: () => void;
};

const SAYERS = ['The child', 'The mother', 'The father', 'A carer', 'Nobody: two of us read the wristband'];
const typed =
  <Entries,>(enter: (changes: Partial<Entries>) => void, field: keyof Entries) =>
  ({ target }: { target: { value: string } }) =>
    enter({ [field]: target.value } as unknown as Partial<Entries>);

export function ChildFields({ entries, verdict, enter, onLast }: FieldsProps<BedsideEntries['child']>) {
  return (
    <div className="grid gap-s3">
      <div className="two flex gap-s3">
        <TextField
          id="bedside-number"
          label="Hospital no. on the band"
          size="big"
          spellCheck={false}
          value={entries.number}
          onChange={typed(enter, 'number')}
          error={findingOf(verdict, 'number')}
        />
        <DateTimeField
          id="bedside-bornOn"
          kind="date"
          label="Date of birth on the band"
          className="big"
          value={entries.bornOn}
          onChange={typed(enter, 'bornOn')}
          error={findingOf(verdict, 'bornOn')}
        />
      </div>
      <SelectField
        id="bedside-saidBy"
        label="Who said name and date of birth"
        size="big"
        options={[{ value: '', label: 'Not asked' }, ...SAYERS.map((label) => ({ value: label, label }))]}
        value={entries.saidBy}
        onChange={typed(enter, 'saidBy')}
        onBlur={onLast}
      />
    </div>
  );
}

type BagProps = FieldsProps<BedsideEntries['bag']> & {
  products: BedsidePage['products'];
  isHighRisk: boolean;
};

export function BagFields({ entries, verdict, enter, onLast, products, isHighRisk }: BagProps) {
  const options = [...products]
    .sort((a, b) => a.name.localeCompare(b.name))
    .map(({ id, name }) => ({ value: id, label: name }));
  return (
    <div className="grid gap-s3">
      <SelectField
        id="bedside-productId"
        label="What is printed on the bag"
        size="big"
        placeholder="Choose"
        options={options}
        // the box may be too narrow for a name, and two bags may differ in its last word
        hint={products.find(({ id }) => id === entries.productId)?.name}
        value={entries.productId}
        onChange={typed(enter, 'productId')}
        error={findingOf(verdict, 'productId')}
      />
      <div className="two flex gap-s3">
        <NumberField
          id="bedside-sizeMl"
          label="Bag size"
          unit="mL"
          size="big"
          ownHand
          value={entries.sizeMl}
          onChange={typed(enter, 'sizeMl')}
          error={findingOf(verdict, 'sizeMl')}
        />
        <TextField
          id="bedside-batch"
          label={isHighRisk ? 'Batch' : 'Batch, if you can read it'}
          size="big"
          spellCheck={false}
          value={entries.batch}
          onChange={typed(enter, 'batch')}
          error={findingOf(verdict, 'batch')}
        />
      </div>
      <div className="two flex gap-s3">
        <TextField
          id="bedside-bagNumber"
          label="Bag number, if it has one"
          size="big"
          spellCheck={false}
          value={entries.bagNumber}
          onChange={typed(enter, 'bagNumber')}
        />
        <DateTimeField
          id="bedside-expiry"
          kind="date"
          label="Expires on"
          className="big"
          value={entries.expiry}
          onChange={typed(enter, 'expiry')}
          onBlur={onLast}
          error={findingOf(verdict, 'expiry')}
        />
      </div>
    </div>
  );
}

type PumpProps = FieldsProps<BedsideEntries['pump']> & { byPump: boolean; idPrefix?: string };

/** Rate and volume as they stand on the pump's own screen; of a bolus by hand, volume and time. */
export function PumpFields({ entries, verdict, enter, onLast, byPump, idPrefix = 'bedside' }: PumpProps) {
  const id = (field: string) => `${idPrefix}-${field}`;
  const findings = verdict?.findings ?? [];
  const errorOf = (field: string) => ({
    error: findingOf(verdict, field),
    errorId: id('pump-error'),
  });
  const figure = (field: 'rate' | 'volume' | 'minutes', label: string, unit: string, isLast: boolean) => (
    <NumberField
      id={id(field)}
      label={label}
      unit={unit}
      size="big"
      ownHand
      value={entries[field]}
      onChange={typed(enter, field)}
      onBlur={isLast ? onLast : undefined}
      {...errorOf(field)}
    />
  );
  return (
    <div className="grid gap-s3">
      {byPump && (
        <div className="two flex gap-s3">
          <TextField
            id={id('device')}
            label="Pump number"
            size="big"
            spellCheck={false}
            value={entries.device}
            onChange={typed(enter, 'device')}
            error={findingOf(verdict, 'device')}
          />
          <TextField
            id={id('channel')}
            label="Channel, if it has several"
            size="big"
            spellCheck={false}
            value={entries.channel}
            onChange={typed(enter, 'channel')}
          />
        </div>
      )}
      <div>
        <div className="two flex gap-s3">
          {byPump ? (
            <>
              {figure('rate', 'Rate the pump shows', 'mL/h', false)}
              {figure('volume', 'Volume the pump shows', 'mL', true)}
            </>
          ) : (
            <>
              {figure('volume', 'Volume to be given', 'mL', false)}
              {figure('minutes', 'Given over', 'min', true)}
            </>
          )}
        </div>
        <div id={id('pump-error')} role="alert">
          {findings
            .filter(({ field }) => field !== 'device')
            .map(({ field, text }) => (
              <p className="err" key={field}>
                <Glyph name="refused" />
                <span>{text}</span>
              </p>
            ))}
        </div>
      </div>
    </div>
  );
}

export const LINE_WORDS: Readonly<Record<LineClass, string>> = {
  peripheral: 'Peripheral cannula',
  central: 'Central line',
  intraosseous: 'Intraosseous needle',
};
/** In the narrow box of a phone. */
const LINE_SHORT: typeof LINE_WORDS = {
  peripheral: 'Peripheral',
  central: 'Central',
  intraosseous: 'Intraosseous',
};
const SEEN = [
  ['traced', 'Traced from the bag through the pump to the cannula'],
  ['clampOpen', 'Clamp open'],
  ['siteLooksWell', 'Site looks well: no swelling, redness or pain'],
] as const;

export function LineFields({ entries, verdict, enter, onLast }: FieldsProps<BedsideEntries['line']>) {
  return (
    <div className="grid gap-s3">
      <div className="two flex gap-s3">
        <SelectField
          id="bedside-lineClass"
          label="Kind of line"
          size="big"
          placeholder="Choose"
          options={LINE_CLASSES.map((value) => ({ value, label: LINE_SHORT[value] }))}
          value={entries.lineClass}
          onChange={typed(enter, 'lineClass')}
          error={findingOf(verdict, 'lineClass')}
        />
        <TextField
          id="bedside-site"
          label="Where, for instance left hand"
          size="big"
          value={entries.site}
          onChange={typed(enter, 'site')}
          error={findingOf(verdict, 'site')}
        />
      </div>
      <div>
        {SEEN.map(([field, words], index) => (
          <div key={field}>
            <Choice
              id={`bedside-${field}`}
              className="min-h-[48px]"
              checked={entries[field]}
              onChange={({ target }) => enter({ [field]: target.checked })}
              onBlur={index === SEEN.length - 1 ? onLast : undefined}
              aria-describedby={`bedside-${field}-error`}
            >
              {words}
            </Choice>
            <div id={`bedside-${field}-error`}>
              {findingOf(verdict, field) && (
                <p className="err mt-0">
                  <Glyph name="refused" />
                  <span>{findingOf(verdict, field)}</span>
                </p>
              )}
            </div>
          </div>
        ))}
      </div>
    </div>
  );
}
