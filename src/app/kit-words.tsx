import { GLYPH_NAMES } from '@shared/gauge/glyphs';
import { VERSION_STATES } from '@shared/orders/states';
import { Figure } from '@/components/ui/figure';
import { Glyph } from '@/components/ui/glyph';
import { IdentityStrip } from '@/components/ui/identity-strip';
import { GlyphWord, StateWord } from '@/components/ui/state-word';

const TOKENS = [
  'paper surface ink ink-soft rule edge',
  'tide tide-deep tide-soft on-tide fill engrave',
  'brim brim-deep brim-soft on-brim',
  'ochre ochre-soft leaf leaf-soft',
  'plum plum-deep plum-soft on-plum fill-plum',
];

export function KitWords() {
  return (
    <>
      <ul className="flex flex-wrap gap-x-s5 gap-y-s3">
        {VERSION_STATES.map((state) => (
          <li key={state}>
            <StateWord state={state} />
          </li>
        ))}
        <li>
          <GlyphWord glyph="caution" tone="ochre">
            Does not agree
          </GlyphWord>
        </li>
      </ul>
      <ul className="flex flex-wrap gap-s4 pt-s4">
        {GLYPH_NAMES.map((name) => (
          <li key={name} className="w-24 text-tag">
            <Glyph name={name} size="verdict" />
            {name}
          </li>
        ))}
      </ul>
      <div className="flex flex-wrap items-end gap-s6 pt-s5">
        <Figure value="52.1" unit="mL/h" />
        <Figure value="44.0" unit="mL/h" size="l" />
        <Figure value="44" unit="mL/h" size="m" tone="plum" />
        <Figure value="31.1" unit="mL/h" size="run" stale />
        <Figure value="620" unit="mL asked for" size="s" tone="brim" />
        <Figure value="83.3" unit="mL/h" size="row" />
      </div>
    </>
  );
}

export function KitIdentity() {
  return (
    <IdentityStrip
      name={{ surname: 'Hartnoll', given: 'Edie' }}
      born="14 Mar 2022"
      age="4 y"
      hospitalNumber="SM 418 207"
      sex="Female"
      weight={{ text: '16.4 kg', how: '10 Jun 07:50, standing scales' }}
      allergies="Ibuprofen: wheeze"
      flags={['Raised ADH risk']}
    >
      <a href="#words" aria-current="page">
        Order
      </a>
      <a href="#words">Chart</a>
    </IdentityStrip>
  );
}

export function KitTokens() {
  return (
    <div className="grid gap-s2">
      {TOKENS.map((row) => (
        <ul key={row} className="flex flex-wrap gap-s4">
          {row.split(' ').map((token) => (
            <li key={token} className="flex items-center gap-s2 text-small">
              <i
                className="block h-5 w-8 rounded-chip border border-edge"
                style={{ background: `var(--${token})` }}
              />
              {token}
            </li>
          ))}
        </ul>
      ))}
    </div>
  );
}
