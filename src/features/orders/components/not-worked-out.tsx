import { Button } from '@/components/ui/button';
import { GlyphWord } from '@/components/ui/state-word';
import type { OrderFormField } from '@shared/orders/form';
import type { DraftWork } from '@shared/orders/work-out-draft';
import type { Offer } from '../forms/apply-offer';
import { FIELD_WORDS, focusField } from '../forms/order-words';

type Incomplete = Extract<DraftWork, { missing: unknown }>;
type Refused = Extract<DraftWork, { detail: string }>;

/** A dose is two boxes and a way of saying it: one entry to the person who types it. */
const named = (fields: readonly OrderFormField[]): OrderFormField[] => [...new Set(fields)];

function Jumps({
  fields,
  onJump,
}: {
  fields: readonly OrderFormField[];
  onJump: (field: OrderFormField) => void;
}) {
  return (
    <ul>
      {fields.map((field) => (
        <li key={field}>
          <Button kind="quiet" small className="-ml-[13px]" onClick={() => onJump(field)}>
            {FIELD_WORDS[field]}
          </Button>
        </li>
      ))}
    </ul>
  );
}

/** Entries are missing: which ones, and nothing else. A figure from a guess is never shown. */
export function IncompleteBlock({ work }: { work: Incomplete }) {
  const missing = named(work.missing);
  const wrong = (Object.keys(work.fields) as OrderFormField[]).filter((field) => !missing.includes(field));
  return (
    <div className="figblock">
      <p className="figlab">Nothing is worked out yet</p>
      <p className="soft">The figures appear when every entry is there. None is guessed.</p>
      {missing.length > 0 && (
        <section className="sec">
          <h2>
            Still to enter<span>{missing.length}</span>
          </h2>
          <Jumps fields={missing} onJump={focusField} />
        </section>
      )}
      {wrong.length > 0 && (
        <section className="sec">
          <h2>
            To be put right<span>{wrong.length}</span>
          </h2>
          <ul>
            {wrong.map((field) => (
              <li key={field} className="border-b border-rule py-[3px]">
                <Button kind="quiet" small className="-ml-[13px]" onClick={() => focusField(field)}>
                  {FIELD_WORDS[field]}
                </Button>
                <span className="text-small">{work.fields[field]}</span>
              </li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}

/** The rules have no figure for this child and these entries. */
export function RefusedBlock({ work, onOffer }: { work: Refused; onOffer: (offer: Offer) => void }) {
  const { detail, offer } = work;
  return (
    <div className="figblock">
      <p className="figlab">
        <GlyphWord glyph="refused" tone="brim">
          This cannot be worked out
        </GlyphWord>
      </p>
      <p className="figsub">{detail}</p>
      {offer && (
        <Button kind="primary" className="mt-s3" onClick={() => onOffer(offer)}>
          {offer.label}
        </Button>
      )}
    </div>
  );
}
