import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Choice } from '@/components/ui/choice';
import { DateTimeField } from '@/components/ui/date-time-field';
import { Glyph } from '@/components/ui/glyph';
import { Group, Owed, Row } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';
import { TextareaField } from '@/components/ui/textarea-field';

const KINDS = ['Maintenance', 'Replace losses', 'Correct dehydration', 'Bolus'];
const FRACTIONS = [
  { value: '1', label: '100%', consequence: '1320 mL' },
  { value: '0.8', label: '80%', consequence: '1056 mL' },
  { value: '2/3', label: '66.7%', consequence: '880 mL' },
  { value: '0.5', label: '50%', consequence: '660 mL' },
];
const FLUIDS = [
  {
    group: 'On the shelf',
    options: [
      { value: 'a', label: 'Sodium chloride 0.9% + glucose 5%' },
      { value: 'b', label: 'Sodium chloride 0.9%' },
    ],
  },
  { value: 'c', label: 'Glucose 10%', disabled: true },
];

function States() {
  return (
    <>
      <Row>
        <NumberField label="At rest" unit="kg" defaultValue="16.4" />
        <NumberField label="Read only" unit="kg" defaultValue="16.4" readOnly />
        <NumberField label="By hand only" unit="mL/h" ownHand size="normal" placeholder="no paste" />
      </Row>
      <Row>
        <NumberField
          label="Caution"
          unit="days old"
          defaultValue="9"
          caution="Weigh again before you sign."
        />
        <NumberField
          label="Over the brim"
          unit="mL"
          defaultValue="620"
          overBrim
          error="120 mL over the brim."
        />
        <NumberField label="Missing" unit="mL/h" error="Type the rate, in mL/h." />
      </Row>
      <Row>
        <NumberField label="Bedside" unit="mL/h" size="big" defaultValue="440" />
        <NumberField label="The figure of a check" unit="mL/h" size="key" ownHand defaultValue="44" />
      </Row>
      <Segmented
        label="The checker’s choice"
        tone="plum"
        options={FRACTIONS.map(({ value, label }) => ({ value, label }))}
        defaultValue="0.8"
      />
      <TextField
        label="Find"
        labelHidden
        before={<Glyph name="find" />}
        placeholder="Name, bed or hospital no."
      />
      <div className="flex gap-s4">
        <Choice kind="radio" name="sign" defaultChecked>
          not seen
        </Choice>
        <Choice kind="radio" name="sign" warns>
          seen
        </Choice>
        <Choice>Read back to a second person</Choice>
      </div>
    </>
  );
}

export function KitFields() {
  const [kind, setKind] = useState('Maintenance');
  const [when, setWhen] = useState('2026-06-10T07:50');
  return (
    <div className="grid gap-s6 wide:grid-cols-2">
      <form>
        <Group head="What for" align="label">
          <Segmented
            label="What for"
            labelHidden
            options={KINDS.map((value) => ({ value, label: value }))}
            value={kind}
            onChoose={setKind}
          />
          <TextField
            label="Reason for fluids"
            labelHidden
            defaultValue="Pneumonia: too breathless to drink enough"
          />
        </Group>
        <Group head="Weight">
          <Row>
            <NumberField label="Weight" unit="kg" defaultValue="16.4" width="w" />
            <SelectField label="How" width="w2" options={[{ value: 's', label: 'Standing scales' }]} />
            <DateTimeField
              label="When"
              width="w2"
              value={when}
              onChange={(event) => setWhen(event.target.value)}
            />
          </Row>
        </Group>
        <Group head="Method">
          <Row>
            <SelectField label="Formula" width="m" options={[{ value: 'h', label: 'Holliday–Segar' }]} />
            <Segmented label="Fraction of full maintenance" options={FRACTIONS} defaultValue="1" />
          </Row>
          <Owed>
            <TextareaField
              label="Why 100% when ADH risk is raised"
              defaultValue="Sodium 140, urine 1.6 mL/kg/h. Seen with Dr Amadi-Price."
              rows={1}
            />
          </Owed>
        </Group>
        <Group head="Fluid" note="from the shelf">
          <SelectField
            label="Base fluid"
            placeholder="Choose a fluid"
            defaultValue=""
            options={FLUIDS}
            hint="A bolus carries no glucose and no added potassium."
          />
        </Group>
      </form>
      <div className="grid content-start gap-s3">
        <States />
      </div>
    </div>
  );
}

export function KitButtons() {
  const [isBusy, setIsBusy] = useState(false);
  return (
    <div className="flex flex-wrap items-center gap-s3">
      <Button
        kind="primary"
        glyph="signed"
        busy={isBusy}
        busyLabel="Signing, please wait"
        onClick={() => setIsBusy(true)}
      >
        Sign and ask for a check
      </Button>
      <Button>Keep as a draft</Button>
      <Button kind="quiet" onClick={() => setIsBusy(false)}>
        Discard
      </Button>
      <Button kind="plum" glyph="covered">
        Lock in my figures
      </Button>
      <Button kind="stop" glyph="stopped">
        Stop the infusion
      </Button>
      <Button small>Ask for a review</Button>
      <Button kind="primary" shutReason="The pump shows 440 mL/h, the order says 44.">
        Record start
      </Button>
      <div className="w-[300px]">
        <Button kind="go">Record start</Button>
      </div>
    </div>
  );
}
