import type { ReactNode } from 'react';
import { HatchChip } from '../covered/hatch-chip';
import { Glyph } from './glyph';

type IdentityStripProps = {
  name: { surname: string; given: string };
  /** "14 Mar 2022" */
  born: string;
  /** "4 y" */
  age: string;
  hospitalNumber: string;
  sex: string;
  /** how: "10 Jun 07:50, standing scales". Covered: the page was never sent the value. */
  weight: { text: string; how?: string } | 'covered' | null;
  allergies: string;
  flags: readonly string[];
  /** Links about this child. */
  children?: ReactNode;
  /** What hangs below and stays with the strip: a running dose and its Stop. */
  below?: ReactNode;
};

function Flag({ children }: { children: ReactNode }) {
  return (
    <span className="flag">
      <Glyph name="caution" />
      {children}
    </span>
  );
}

function Weight({ weight }: Pick<IdentityStripProps, 'weight'>) {
  if (weight === 'covered') return <HatchChip>Covered</HatchChip>;
  if (weight === null) return <>Not measured</>;
  return (
    <>
      {weight.text}
      {weight.how && <i>{weight.how}</i>}
    </>
  );
}

/** Who the child is, first on every screen with a child and always in view. */
export function IdentityStrip({ name, hospitalNumber, children, below, ...child }: IdentityStripProps) {
  const fullName = (
    <>
      {name.surname}, <i>{name.given}</i>
    </>
  );
  return (
    <section className="child" aria-label="Child">
      <div className="idmini">
        <b>{fullName}</b>
        <span>{hospitalNumber}</span>
      </div>
      <div className="idw">
        <div className="idline">
          <dl className="id">
            <div className="who0">
              <dt className="vh">Name</dt>
              <dd className="nm">{fullName}</dd>
            </div>
            <div className="age">
              <dt>Born</dt>
              <dd>
                {child.born}
                <i>{child.age}</i>
              </dd>
            </div>
            <div className="hn">
              <dt>Hospital no.</dt>
              <dd>{hospitalNumber}</dd>
            </div>
            <div className="sx">
              <dt>Sex</dt>
              <dd>{child.sex}</dd>
            </div>
            <div>
              <dt>Weight</dt>
              <dd>
                <Weight weight={child.weight} />
              </dd>
            </div>
            <div className="allergy">
              <dt>Allergies</dt>
              <dd>{child.allergies}</dd>
            </div>
            <div className="fl">
              <dt>Flags</dt>
              <dd>
                {child.flags.length === 0
                  ? 'None'
                  : child.flags.map((flag) => <Flag key={flag}>{flag}</Flag>)}
              </dd>
            </div>
          </dl>
          {children && (
            <nav className="idlinks" aria-label="This child">
              {children}
            </nav>
          )}
        </div>
        {below && <div className="below">{below}</div>}
      </div>
    </section>
  );
}
