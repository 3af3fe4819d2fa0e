import { useState } from 'react';
import { CoverPanel } from '@/components/covered/cover-panel';
import { HatchChip } from '@/components/covered/hatch-chip';
import { Button } from '@/components/ui/button';
import { CautionList } from '@/components/workings/caution-list';
import { GivesGrid } from '@/components/workings/gives-grid';
import { OtherBrims } from '@/components/workings/other-brims';
import type { WorkingRow } from '@/components/workings/workings-table';
import { WorkingsTable } from '@/components/workings/workings-table';

const SEGAR = 'Holliday & Segar 1957';
const ROWS: readonly WorkingRow[] = [
  { label: 'first 10 kg', working: '10 × 100', result: '1000', unit: 'mL', source: SEGAR },
  { label: 'next 6.4 kg', working: '6.4 × 50', result: '320', unit: 'mL', source: SEGAR },
  { label: 'in full, 24 h', working: '1000 + 320', result: '1320', unit: 'mL', mark: 'sum' },
  { label: 'fraction', working: '1320 × 100%', result: '1320', unit: 'mL', source: 'your choice' },
  { label: 'drug volumes', working: '1320 − 70', result: '1250', unit: 'mL', source: 'drug chart, 10:20' },
  { label: 'brim', working: 'in 24 h', result: '2000', unit: 'mL', source: 'rulebook', mark: 'stop' },
  { label: 'per hour', working: '1250 ÷ 24', result: '52.08', unit: 'mL/h' },
  {
    label: 'on the pump',
    working: 'nearest 0.1',
    result: '52.1',
    unit: 'mL/h',
    source: 'pump step',
    mark: 'answer',
  },
];

export function KitWorkings() {
  return (
    <div className="grid gap-s6 wide:grid-cols-3">
      <WorkingsTable rows={ROWS} />
      <div>
        <GivesGrid
          figures={[
            { label: 'Volume', value: '3.18', unit: 'mL/kg/h' },
            { label: 'Of full maintenance', value: '94.7', unit: '%' },
            { label: 'Glucose', value: '2.65', unit: 'mg/kg/min' },
            { label: 'Sodium', value: '11.7', unit: 'mmol/kg/day' },
            { label: 'Potassium', value: '1.5', unit: 'mmol/kg/day' },
            { label: 'Energy', value: '15.2', unit: 'kcal/kg/day' },
          ]}
        />
        <OtherBrims
          brims={[
            { label: 'Potassium', text: '0.06 of 0.2 mmol/kg/h', ratio: 0.3 },
            { label: 'Valid for', text: '24 of 24 h', ratio: 1 },
          ]}
        />
      </div>
      <CautionList
        entries={[
          { strength: 'caution', title: 'Raised ADH risk at 100%.', text: 'Your reason is printed with it.' },
          {
            strength: 'senior',
            title: 'A senior has to agree:',
            text: 'above the method by more than a pump step.',
          },
          { strength: 'brim', title: 'Over the brim by 120 mL.', text: 'Nobody passes it here.' },
          {
            strength: 'offer',
            title: 'Give 500 mL, then look again.',
            text: 'A second bolus is a new order.',
          },
          { strength: 'met', title: 'Potassium may be added.', text: '3.9 mmol/L, urine at 09:40.' },
          { strength: 'information', title: 'Not a feed:', text: '15.2 kcal/kg/day.' },
        ]}
      />
    </div>
  );
}

const LINES = [
  { label: 'Weight' },
  { label: 'Fluid' },
  { label: 'Rate', tall: true },
  { label: 'Total volume' },
];

export function KitCovered() {
  const [isLifted, setIsLifted] = useState(false);
  const [round, setRound] = useState(0);
  const turn = () => {
    if (isLifted) setRound(round + 1);
    setIsLifted(!isLifted);
  };
  return (
    <div className="grid gap-s4">
      <div className="flex items-center gap-s4">
        <HatchChip />
        <Button kind="plum" onClick={turn}>
          {isLifted ? 'Cover again' : 'Lift the cover'}
        </Button>
      </div>
      <div className="min-h-[420px] bg-surface">
        <CoverPanel
          key={round}
          rows={LINES}
          sentence="Then both sets open side by side. Yours can’t be changed after that."
          isLifted={isLifted}
        >
          <p className="p-s5">The other figures, sent after lock-in.</p>
        </CoverPanel>
      </div>
      <CoverPanel />
    </div>
  );
}
