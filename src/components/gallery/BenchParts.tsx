import { useState } from 'react';
import { CheckList } from '../CheckList';
import { DialTile } from '../DialTile';
import { Figures } from '../Figures';
import { Panel } from '../Panel';
import { SavedMark } from '../SavedMark';
import { StepStrip } from '../StepStrip';
import { TermBoard, type Term } from '../TermBoard';

const TERMS: readonly Term[] = [
  { key: 'V', name: 'Voltage', row: -1, column: 0, state: 'in', estimate: 6.93, weight: 0.9 },
  { key: 'g', name: 'Gap', row: -1, column: 1, state: 'in', estimate: -1.21, weight: 0.15 },
  { key: 'N', name: 'Pulses (log)', row: -1, column: 2, state: 'in', estimate: 8.99, weight: 1 },
  { key: 'VV', name: 'Voltage²', row: 0, column: 0, state: 'in', estimate: -2.96, weight: 0.3 },
  { key: 'Vg', name: 'Voltage × gap', row: 1, column: 0, state: 'in', estimate: 4.66, weight: 0.3 },
  {
    key: 'gg',
    name: 'Gap²',
    row: 1,
    column: 1,
    state: 'notEstimable',
    estimate: null,
    weight: 0,
    reason: 'Too few distinct gaps.',
  },
  {
    key: 'VN',
    name: 'Voltage × pulses',
    row: 2,
    column: 0,
    state: 'in',
    estimate: -2.7,
    weight: 0.2,
  },
  {
    key: 'gN',
    name: 'Gap × pulses',
    row: 2,
    column: 1,
    state: 'out',
    estimate: null,
    weight: 0.05,
  },
  { key: 'NN', name: 'Pulses²', row: 2, column: 2, state: 'in', estimate: -4.14, weight: 0.35 },
];

function Terms() {
  const [out, setOut] = useState<readonly string[]>(['gN']);
  const terms = TERMS.map((term) =>
    term.state === 'notEstimable'
      ? term
      : { ...term, state: out.includes(term.key) ? ('out' as const) : ('in' as const) },
  );
  const toggle = (key: string) =>
    setOut(out.includes(key) ? out.filter((each) => each !== key) : [...out, key]);
  return (
    <Panel name="Terms" fact="press to take one in or out; bar: |t|">
      <TermBoard
        label="Terms of the model"
        factors={['voltage', 'gap', 'pulses']}
        terms={terms}
        onToggled={toggle}
      />
    </Panel>
  );
}

export function BenchParts() {
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <Terms />
      <Panel name="Before you sign">
        <div className="grid gap-4">
          <CheckList
            items={[
              { key: 'a', fill: 'full', state: 'done', text: 'Both models hold.' },
              { key: 'b', fill: 'half', state: 'partly', text: 'If the dial drifts: 92 of 100.' },
              { key: 'c', fill: 'hollow', state: 'open', text: 'Not confirmed.' },
              { key: 'd', fill: 'struck', state: 'cannot be', text: 'V·g cannot be told apart.' },
            ]}
          />
          <Figures
            items={[
              { label: 'Runs', value: 3 },
              { label: 'Sample', value: 900, unit: 'g' },
              { label: 'Result', value: 'Fri 13 March', note: ', dry overnight' },
            ]}
          />
          <Figures
            isMono
            size="large"
            items={[
              { label: 'Field', value: '4.71', unit: 'kV/mm' },
              { label: 'P80', value: '1.99', unit: 'mm' },
            ]}
          />
        </div>
      </Panel>
      <section data-theme="dark" className="p-4 lg:col-span-2">
        <div className="mb-3 flex flex-wrap justify-end gap-x-8 gap-y-2">
          <SavedMark state="sent" claim="Saved 16:21" note="all entries sent" />
          <SavedMark
            state="here"
            claim="Saved on this tablet 10:42"
            note="1 entry waits for the network"
          />
          <SavedMark state="unsaved" claim="Not saved yet" />
        </div>
        <StepStrip
          name="Steps of this run"
          steps={['Dial in', 'Check', 'Pulse', 'Record', 'Sieve']}
          now={1}
        />
        <div className="mt-4 grid grid-cols-2">
          <DialTile name="Voltage" figure="160" unit="kV" change={{ from: '180', isUp: false }} />
          <DialTile name="Frequency" figure="2.0" unit="Hz" change={null} />
        </div>
      </section>
    </div>
  );
}
