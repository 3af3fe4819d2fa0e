import type { GaugeInput } from '@shared/gauge/input';
import { BrimGauge } from '@/components/gauge/brim-gauge';
import { SmallGauge } from '@/components/gauge/small-gauge';

type Shown = {
  title: string;
  text: string;
  input: Omit<GaugeInput, 'heightPx' | 'brimNote'> & { brimNote?: string };
  plum?: boolean;
};

const first = { label: 'first 10 kg', ml: 1000, fullMl: 1000 };
const second = { label: 'next 10 kg', ml: 500, fullMl: 500 };
const partial = { label: 'next 6.4 kg', ml: 320, fullMl: 320 };

const GAUGES: readonly Shown[] = [
  {
    title: 'Under, with a fraction',
    text: '16.4 kg at 80%. The held-back part stays pale.',
    input: {
      orderMl: 1056,
      brimMl: 2000,
      bands: [first, partial],
      ghosts: [{ label: 'held back 264', ml: 264 }],
    },
  },
  {
    title: 'Under, three bands',
    text: '28 kg at 100%.',
    input: {
      orderMl: 1660,
      brimMl: 2000,
      bands: [first, second, { label: 'last 8 kg', ml: 160, fullMl: 160 }],
      ghosts: [],
    },
  },
  {
    title: 'At the brim',
    text: '58.3 kg works out at 2266 mL; the order gives 2000.',
    input: {
      orderMl: 2000,
      brimMl: 2000,
      bands: [first, second, { label: 'last 38.3 kg', ml: 500, fullMl: 766 }],
      ghosts: [],
    },
  },
  {
    title: 'Over',
    text: 'Fill stops at the line, the excess is hatched, signing is shut.',
    input: {
      orderMl: 620,
      brimMl: 500,
      brimNote: 'in one bolus',
      bands: [{ label: 'to the brim', ml: 500, fullMl: 500 }],
      ghosts: [],
    },
  },
  {
    title: 'Close below, two reductions',
    text: 'The flag leaves no room above: the words move down.',
    input: {
      orderMl: 1900,
      brimMl: 2000,
      bands: [first, second, { label: 'last 25 kg', ml: 500, fullMl: 500 }],
      ghosts: [
        { label: '70 mL as drugs', ml: 70 },
        { label: '30 mL as feeds', ml: 30 },
      ],
    },
  },
  {
    title: 'The checker’s',
    text: 'A newborn: small brim, short bands.',
    plum: true,
    input: {
      orderMl: 180,
      brimMl: 630,
      bands: [{ label: '3.5 kg', ml: 280, fullMl: 280 }],
      ghosts: [{ label: '100 mL as feeds', ml: 100 }],
    },
  },
];

export function KitGauges() {
  return (
    <div className="flex flex-wrap gap-s5">
      {GAUGES.map((shown) => (
        <figure key={shown.title} className="w-[252px]">
          <BrimGauge brimNote="in 24 h" {...shown.input} heightPx={360} tone={shown.plum ? 'plum' : 'tide'} />
          <figcaption className="note">
            <b className="block text-base">{shown.title}</b>
            {shown.text}
          </figcaption>
        </figure>
      ))}
    </div>
  );
}

const SMALL = [
  { name: 'Under', value: 1056, brim: 2000, notches: [1000, 1320], onPump: true },
  { name: 'At the brim', value: 2000, brim: 2000, notches: [1000, 1500], onPump: true },
  { name: 'Over', value: 620, brim: 500, notches: [], onPump: false },
  { name: 'Not on a pump', value: 1660, brim: 2000, notches: [1000, 1500, 1660], onPump: false },
  { name: 'Nothing ordered', value: 0, brim: 2000, notches: [], onPump: false },
];

export function KitSmallGauges() {
  return (
    <ul className="blist max-w-[420px]">
      {SMALL.map(({ name, ...gauge }) => (
        <li key={name}>
          <p>
            <span>{name}</span>
            <span>
              <b>{gauge.value}</b> of {gauge.brim} mL
            </span>
          </p>
          <SmallGauge {...gauge} widthPx={160} label="" />
        </li>
      ))}
    </ul>
  );
}
