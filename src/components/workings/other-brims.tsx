import type { ReactNode } from 'react';
import { SmallGauge } from '../gauge/small-gauge';

export type OtherBrim = {
  label: string;
  /** "0.06 of 0.20 mmol/kg/h", the first figure bold. */
  text: ReactNode;
  /** Value over brim: 1 is at the brim. */
  ratio: number;
};

/** The ceilings that hold this order besides the volume. */
export function OtherBrims({ brims, widthPx = 252 }: { brims: readonly OtherBrim[]; widthPx?: number }) {
  return (
    <ul className="blist">
      {brims.map((brim) => (
        <li key={brim.label}>
          <p>
            <span>{brim.label}</span>
            <span>{brim.text}</span>
          </p>
          <SmallGauge value={brim.ratio} brim={1} widthPx={widthPx} label="" />
        </li>
      ))}
    </ul>
  );
}
