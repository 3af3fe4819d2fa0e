import { StateWord } from '@/components/ui/state-word';
import { KIND_WORDS } from '@shared/orders/words';
import type { Draft } from '@shared/routes/orders';
import { useDraftForm } from '../forms/draft-form';
import { CameBack } from './came-back';
import { AlreadyGivenGroup, DoseGroup } from './dose-group';
import { FluidGroup } from './fluid-group';
import { LineGroup } from './line-group';
import { MethodGroup } from './method-group';
import { ReasonsGroup } from './reasons-group';
import { TakeAwayGroup } from './take-away-group';
import { TimesGroup } from './times-group';
import { WeightGroup } from './weight-group';
import { WhatForGroup } from './what-for-group';

export const kindTitle = (kind: string): string =>
  `${kind in KIND_WORDS ? KIND_WORDS[kind as keyof typeof KIND_WORDS] : 'Fluid'} order`;

/** The left page: what the clinician writes. Enter in a field signs nothing. */
export function DraftFormPage({ draft, isAsked }: { draft: Draft; isAsked: boolean }) {
  const { values } = useDraftForm();
  const isBolus = values.kind === 'bolus';
  const { code, version, follows, cameBack, versionId } = draft;
  return (
    <form className="lp" aria-label="Draft order" onSubmit={(event) => event.preventDefault()} noValidate>
      <div className="ttl">
        <h1>{kindTitle(values.kind)}</h1>
        <StateWord state="draft" />
        <span className="tag">
          {code}
          {version > 1 && `, version ${version}`}
          {follows && `, follows ${follows.text}`}
        </span>
      </div>
      {cameBack && <CameBack cameBack={cameBack} />}
      <WhatForGroup />
      <WeightGroup versionId={versionId} />
      {isBolus ? <DoseGroup /> : <MethodGroup />}
      {isBolus ? <AlreadyGivenGroup /> : <TakeAwayGroup />}
      <FluidGroup />
      <LineGroup />
      <TimesGroup />
      <ReasonsGroup isAsked={isAsked} />
    </form>
  );
}
