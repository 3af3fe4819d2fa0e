import type { ReactNode } from 'react';
import { OfflineBar } from '@/components/ui/offline-bar';
import { SkipLink } from '@/components/ui/skip-link';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { TopBar } from '@/components/ui/top-bar';
import { KitBars, KitMessages } from './kit-bars';
import { KitButtons, KitFields } from './kit-forms';
import { KitGauges, KitSmallGauges } from './kit-gauges';
import { KitIdentity, KitTokens, KitWords } from './kit-words';
import { KitCovered, KitWorkings } from './kit-workings';

/** Every part in every state, for developers; the pages are compared with it. */
export function KitPage() {
  const part = (heading: string, children: ReactNode, note?: string) => (
    <section className="mt-s6">
      <h2 className="h2 mb-s3">
        {heading}
        {note && <span>{note}</span>}
      </h2>
      {children}
    </section>
  );
  return (
    <>
      <SkipLink />
      <TopBar
        time="10:42"
        who={{ name: 'Kit', grade: 'for developers' }}
        extras={<ThemeSwitch />}
        onLock={() => undefined}
      >
        <a href="#words" aria-current="page">
          Words
        </a>
        <a href="#forms">Forms</a>
        <a href="#workings">Workings</a>
      </TopBar>
      <OfflineBar since="10:39" />
      <KitIdentity />
      <main className="page" id="main" tabIndex={-1}>
        <h1 className="text-page font-bold">Kit: every part, every state</h1>
        <div id="words">{part('States and glyphs', <KitWords />, 'always with the word')}</div>
        {part(
          'Brim gauge',
          <KitGauges />,
          'the marks belong to the child, the fill to the order, the brim to the rules',
        )}
        {part('Small gauges', <KitSmallGauges />, 'solid: on a pump now; hollow: not')}
        <div id="forms">{part('Fields', <KitFields />)}</div>
        {part('Buttons', <KitButtons />)}
        <div id="workings">{part('Workings', <KitWorkings />)}</div>
        {part('Covered', <KitCovered />)}
        {part('Messages', <KitMessages />)}
        {part('Colours', <KitTokens />)}
      </main>
      <KitBars />
    </>
  );
}
