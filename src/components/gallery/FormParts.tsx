import { useState } from 'react';
import { Checkbox } from '../Checkbox';
import { Field } from '../Field';
import { Panel } from '../Panel';
import { RadioCards } from '../RadioCards';
import { Segments } from '../Segments';
import { SelectField } from '../SelectField';
import { Stepper } from '../Stepper';
import { TextArea } from '../TextArea';

const STACKS = [
  { value: '200', label: 'Coarse stack, 200 mm' },
  { value: '300', label: 'Fine stack, 200 mm', isDisabled: true },
];

function Fields() {
  return (
    <Panel name="Fields" fact="label, unit, hint; error and caution in words">
      <div className="grid items-start gap-4 sm:grid-cols-3">
        <Field label="Dry feed" unit="g" hint="balance reads to 0.02 g" defaultValue="300.20" />
        <Field
          label="Retained on 2 mm"
          unit="g"
          defaultValue="242.6"
          error="More than the sieve may carry (148 g on 200 mm). Did you mean 24.26?"
        />
        <Field
          label="Water at end"
          unit="µS/cm"
          defaultValue="640"
          caution="Above 500: change the water before the next run."
        />
        <SelectField label="Sieve stack" placeholder="Pick a stack" options={STACKS} />
        <SelectField label="Rig" options={STACKS} error="Pick the rig that this study runs on." />
        <Field label="Batch mass" unit="g" disabled defaultValue="300" />
        <TextArea label="Question" hint="one sentence that the study must answer" />
        <TextArea label="Reason" error="A voided run needs its reason." />
        <div>
          <Checkbox label="Interlock tested today" note="08:05 by T. Renn" defaultChecked />
          <Checkbox label="Cell empty" error="Tick it once you have looked." />
          <Checkbox label="Not yours to tick" disabled />
        </div>
      </div>
    </Panel>
  );
}

function Choices() {
  const [region, setRegion] = useState<'envelope' | 'box' | 'full' | null>('envelope');
  const [view, setView] = useState<'map' | 'relief' | 'table'>('map');
  return (
    <Panel
      name="Choices"
      control={
        <Segments
          label="View"
          value={view}
          onPicked={setView}
          options={[
            { value: 'map', label: 'Map' },
            { value: 'relief', label: 'Relief' },
            { value: 'table', label: 'Table', isDisabled: true },
          ]}
        />
      }
    >
      <RadioCards
        legend="Region"
        value={region}
        onPicked={setRegion}
        options={[
          { value: 'envelope', label: 'Fitted to the envelope', note: 'every corner can be set' },
          { value: 'box', label: 'Drawn in', note: 'ranges narrowed until the box fits' },
          {
            value: 'full',
            label: 'Full ranges',
            refusal: 'Four of the 17 runs break the field limit.',
          },
        ]}
      />
    </Panel>
  );
}

function Dials() {
  const [voltage, setVoltage] = useState(160);
  const [frequency, setFrequency] = useState(2);
  return (
    <Panel name="Steppers" fact="heavy line: what the envelope still allows">
      <div className="grid gap-3">
        <Stepper
          label="Voltage"
          unit="kV"
          value={voltage}
          range={{ min: 130, max: 180, step: 5, allowedLow: 140 }}
          onStepped={setVoltage}
        />
        <Stepper
          label="Frequency"
          unit="Hz"
          value={frequency}
          range={{ min: 0.5, max: 5, step: 0.5, allowedHigh: 4 }}
          onStepped={setFrequency}
        />
        <Stepper
          label="Pulses"
          value={60}
          range={{ min: 20, max: 60, step: 1 }}
          onStepped={setFrequency}
          isDisabled
        />
      </div>
    </Panel>
  );
}

function BenchSizes() {
  return (
    <Panel name="At the bench" fact="64 px targets, 24 px apart">
      <div className="grid gap-6 sm:grid-cols-2">
        <Field label="Voltage as read" unit="kV" size="bench" defaultValue="159.6" />
        <Checkbox
          size="bench"
          label="Water to the mark, below 500 µS/cm"
          note="last read 118 µS/cm"
        />
      </div>
    </Panel>
  );
}

export function FormParts() {
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <div className="lg:col-span-2">
        <Fields />
      </div>
      <Choices />
      <Dials />
      <BenchSizes />
    </div>
  );
}
