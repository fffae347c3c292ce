import { useState } from 'react';
import { Chart } from '@/charts/Chart';
import { ChartPanel } from '@/charts/ChartPanel';
import { influenceOption } from '@/charts/influenceOption';
import { PegSlab } from '@/charts/PegSlab';
import { residualOption, type ResidualInput } from '@/charts/residualOption';
import { sectionOption } from '@/charts/sectionOption';
import { sieveCurveOption } from '@/charts/sieveCurveOption';
import { spreadCurveOption } from '@/charts/spreadCurveOption';
import { tradeOffOption } from '@/charts/tradeOffOption';
import { formatNumber } from '@/lib/format';
import { Button } from '../Button';
import { DataTable } from '../DataTable';
import { Panel } from '../Panel';
import {
  AGAINST_FITTED,
  AGAINST_NORMAL,
  IN_ORDER,
  INFLUENCE,
  NORMAL_BAND,
  SECTION,
  SIEVE_CURVE,
  SLAB,
  SPREADS,
  TRADE_OFF,
} from './sampleCharts';

const BLOCKS = [
  { label: 'day 1', from: 1, to: 7 },
  { label: 'day 2', from: 8, to: 14 },
  { label: 'day 3', from: 15, to: 21 },
];

const RESIDUALS: readonly { title: string; input: ResidualInput }[] = [
  { title: 'Against fitted', input: { name: 'fitted passing, %', points: AGAINST_FITTED } },
  {
    title: 'In run order',
    input: { name: 'run order', points: IN_ORDER, blocks: BLOCKS, isJoined: true },
  },
  {
    title: 'Against normal',
    input: { name: 'normal quantile', points: AGAINST_NORMAL, band: NORMAL_BAND },
  },
];

const sieveTable = (
  <DataTable
    caption="Passing by opening"
    rows={SIEVE_CURVE.points}
    rowKey={({ openingMm }) => openingMm}
    columns={[
      {
        key: 'opening',
        header: 'Opening',
        unit: 'mm',
        numeric: true,
        cell: ({ openingMm }) => openingMm,
      },
      {
        key: 'passing',
        header: 'Passing',
        unit: '%',
        numeric: true,
        cell: ({ passingPercent }) => formatNumber(passingPercent, 1),
      },
    ]}
  />
);

function Diagnostics() {
  const [isTable, setTable] = useState(false);
  const table = <p className="p-4">The same residuals as rows.</p>;
  return (
    <Panel
      name="Diagnostics"
      fact="externally studentised residuals; dashes at ±2"
      link={
        <Button variant="quiet" size="small" onClick={() => setTable(!isTable)}>
          {isTable ? 'As charts' : 'As a table'}
        </Button>
      }
    >
      <div className="grid gap-5 sm:grid-cols-2 lg:grid-cols-4">
        {RESIDUALS.map(({ title, input }) => (
          <div key={title} className="min-w-0">
            <h3 className="text-2 font-head">{title}</h3>
            <Chart
              label={`Residuals ${title.toLowerCase()}`}
              height={170}
              table={table}
              isTable={isTable}
              option={(tokens, size) => residualOption(input, tokens, size)}
            />
          </div>
        ))}
        <div className="min-w-0">
          <h3 className="text-2 font-head">Pull on the fit</h3>
          <Chart
            label="Cook's distance and leverage of each run"
            height={170}
            table={table}
            isTable={isTable}
            option={(tokens, size) => influenceOption(INFLUENCE, tokens, size)}
          />
        </div>
      </div>
    </Panel>
  );
}

export function ChartParts() {
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <div className="lg:col-span-2">
        <ChartPanel
          name="Section A–A′"
          fact="band: mean, 95 %; dashed: one new run"
          label="Passing 2 mm along the section, rising from 77 to 86 %"
          height={190}
          option={(tokens, size) => sectionOption(SECTION, tokens, size)}
          table={<p className="p-4">The same section as rows.</p>}
        />
      </div>
      <div className="lg:col-span-2">
        <Diagnostics />
      </div>
      <ChartPanel
        name="Passing"
        fact="each square is a sieve"
        label="Passing over opening: 80.1 % below 2 mm"
        height={360}
        option={(tokens, size) => sieveCurveOption(SIEVE_CURVE, tokens, size)}
        table={sieveTable}
      />
      <ChartPanel
        name="What energy buys"
        label="Passing against specific energy of every settable combination"
        height={340}
        option={(tokens, size) => tradeOffOption(TRADE_OFF, tokens, size)}
        table={<p className="p-4">The same combinations as rows.</p>}
        keys="Dots: settable combinations; filled where the other goals hold. Line: nothing better."
      />
      <Panel name="Fitted to the envelope" fact="picked" className="max-w-80">
        <PegSlab
          {...SLAB}
          label="21 runs over gap, voltage and pulses"
          axes="gap across, voltage deep, pulses high"
        />
        <Chart
          label="Prediction spread over the envelope: half of it below 0.53"
          height={110}
          option={(tokens, size) => spreadCurveOption(SPREADS, tokens, size)}
          table={<p>0.53 at half of it</p>}
        />
      </Panel>
    </div>
  );
}
