import { GoalMark, type GoalSide, type GoalState } from '../GoalMark';
import { GoalRow } from '../GoalRow';
import { HundredSquares, type Outcome } from '../HundredSquares';
import { LedgerBar } from '../LedgerBar';
import { Panel } from '../Panel';
import { RunRing } from '../RunRing';
import { SignatureBlock } from '../SignatureBlock';

const SIDES: readonly GoalSide[] = ['atLeast', 'atMost', 'target', 'range'];
const STATES: readonly GoalState[] = ['holds', 'touches', 'misses', 'unknown'];
const OUTCOMES: readonly Outcome[] = [
  ...Array<Outcome>(91).fill('holds'),
  ...Array<Outcome>(4).fill('above'),
  ...Array<Outcome>(4).fill('below'),
  'both',
];

function Marks() {
  return (
    <Panel name="Marks">
      <div className="grid gap-3">
        {SIDES.map((side) => (
          <div key={side} className="flex flex-wrap gap-5">
            {STATES.map((state) => (
              <GoalMark key={state} side={side} state={state} />
            ))}
          </div>
        ))}
        <div className="flex flex-wrap gap-4">
          {[0, 0.7, 1.4, 2, -0.7, -1.4, -2].map((share) => (
            <span key={share} className="inline-flex items-center gap-1.5">
              <RunRing residualShare={share} size={20} /> {share}
            </span>
          ))}
        </div>
      </div>
    </Panel>
  );
}

function Goals() {
  return (
    <Panel name="Goals at this setting" fact="one new bag, 95 %">
      <GoalRow
        name="Passing 2 mm"
        unit="%"
        digits={1}
        scale={{ low: 70, high: 95 }}
        goal={{ side: 'atLeast', limits: [80] }}
        prediction={{
          value: 84.6,
          mean: { low: 83.2, high: 86 },
          single: { low: 80.1, high: 89 },
        }}
        state="holds"
      />
      <GoalRow
        name="Dust < 0.125 mm"
        unit="%"
        digits={2}
        scale={{ low: 3, high: 10 }}
        goal={{ side: 'range', limits: [4, 7] }}
        prediction={{
          value: 6.28,
          mean: { low: 6, high: 6.56 },
          single: { low: 5.52, high: 7.04 },
        }}
        state="touches"
      />
      <GoalRow
        name="Specific energy"
        unit="kWh/t"
        digits={1}
        scale={{ low: 5, high: 25 }}
        goal={{ side: 'atMost', limits: [18] }}
        prediction={{ value: 14.5, mean: null, single: null }}
        state="holds"
      />
    </Panel>
  );
}

function Squares() {
  return (
    <Panel name="Hundred squares">
      <div className="mb-3 flex items-center gap-3">
        <span className="text-8 font-mark">91</span>
        <span>
          of 100 repeats would meet all three goals
          <span className="block text-2 text-ink-3">±0.4</span>
        </span>
      </div>
      <HundredSquares outcomes={OUTCOMES} />
    </Panel>
  );
}

function Budget() {
  return (
    <Panel name="Sample budget" fact="bags of 300 g">
      <LedgerBar
        total={{ label: 'Received 2 March', massG: 12_400 }}
        parts={[
          { kind: 'used', label: 'Used: 22 runs, 2 head bags', massG: 7200 },
          { kind: 'lost', label: 'Lost in splitting and handling', massG: 130 },
          { kind: 'reserved', label: 'Reserved for confirmation', massG: 900 },
          { kind: 'left', label: 'Left: 13 bags and 0.27 kg', massG: 4170 },
        ]}
      />
    </Panel>
  );
}

export function NumberParts() {
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <Goals />
      <Squares />
      <Marks />
      <Budget />
      <div className="lg:col-span-2">
        <SignatureBlock
          name="Signature block"
          cells={[
            { label: 'Study', value: 'TV-041 Coarse sand from Quernby granite', isWide: true },
            { label: 'Candidate', value: 'A, 165 kV / 26 mm / 36' },
            { label: 'Decision rule', value: 'mean of 3 inside the 95 % interval' },
            { label: 'Revision', value: 'draft 2' },
            { label: 'Fitted', value: 'Marit Oduya', note: '11 March 2026, 09:31' },
            { label: 'Checked', value: 'Callum Prys', note: '11 March 2026, 10:05' },
            { label: 'Confirmed', value: 'waits for 3 runs', isWaiting: true },
            { label: 'Released', value: 'Ines Hallworth, with password', isWaiting: true },
            { label: 'Data seal', value: '7f3a 91c2 04de', isMono: true },
          ]}
        />
      </div>
    </div>
  );
}
