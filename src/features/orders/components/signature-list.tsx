import { Glyph } from '@/components/ui/glyph';
import { GlyphWord } from '@/components/ui/state-word';
import type { Signature } from '@shared/routes/orders';
import { MEANING_WORDS } from '../forms/signature-words';
import { dayTime } from '../forms/order-words';

function Row({ signature, zone }: { signature: Signature; zone: string }) {
  const { meaning, name, role, registrationNumber, at, how, note, isVoid } = signature;
  return (
    <li className="grid grid-cols-[16px_1fr] gap-x-[10px] border-b border-rule py-[6px]">
      <Glyph
        name={isVoid ? 'refused' : 'signed'}
        className={isVoid ? 'c-ochre mt-[3px]' : 'c-leaf mt-[3px]'}
      />
      <div>
        <p>
          <b>{name}</b>{' '}
          <span className="soft">
            {role}, reg. {registrationNumber}
          </span>
        </p>
        <p className="text-small">
          {MEANING_WORDS[meaning]}, <b>{dayTime(at, zone)}</b> <span className="soft">{how}</span>
        </p>
        {note && <p className="text-small text-ink-soft">{note}</p>}
        {isVoid && (
          <GlyphWord glyph="caution" tone="ochre">
            void: the order is not what was signed
          </GlyphWord>
        )}
      </div>
    </li>
  );
}

/** Who signed what, each with its meaning. */
export function SignatureList({ signatures, zone }: { signatures: readonly Signature[]; zone: string }) {
  return (
    <section className="sec">
      <h2>Signed</h2>
      {signatures.length === 0 ? (
        <p className="soft py-[6px]">Nobody has signed this.</p>
      ) : (
        <ul>
          {signatures.map((signature) => (
            <Row
              key={`${signature.meaning} ${signature.name} ${signature.at}`}
              signature={signature}
              zone={zone}
            />
          ))}
        </ul>
      )}
    </section>
  );
}
