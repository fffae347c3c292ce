import { useState } from 'react';
import { ContourMap } from '@/charts/map/ContourMap';
import { MapLegend } from '@/charts/map/MapLegend';
import { formatNumber, formatQuantity } from '@/lib/format';
import { DataTable } from '../DataTable';
import { Panel } from '../Panel';
import { passing, SAMPLE_MAP } from './sampleMap';

/** The map with its handlers: steps of 1 mm and 5 kV. */
export function MapParts() {
  const [setPoint, setSetPoint] = useState({ x: 26, y: 160 });
  const [isTable, setTable] = useState(false);
  const [isSwung, setSwung] = useState(false);
  const place = (x: number, y: number) =>
    setSetPoint({
      x: Math.max(16, Math.min(34, Math.round(x))),
      y: Math.max(130, Math.min(180, 5 * Math.round(y / 5))),
    });
  const section = isSwung
    ? { from: { x: 17.5, y: 160 }, to: { x: 33, y: 160 } }
    : SAMPLE_MAP.section;
  return (
    <Panel name="Passing 2 mm, %" fact="at 40 pulses, 2.0 Hz, 300 g">
      <ContourMap
        map={{ ...SAMPLE_MAP, setPoint, section }}
        label="Map of passing 2 mm over gap and voltage at 40 pulses"
        reading={`${setPoint.y} kV, ${setPoint.x} mm: ${formatQuantity(passing(setPoint.y, setPoint.x), '%', 1)}`}
        height={420}
        isTable={isTable}
        onMoved={({ dx, dy }) => place(setPoint.x + dx, setPoint.y + 5 * dy)}
        onPlaced={({ x, y }) => place(x, y)}
        onSwung={() => setSwung(!isSwung)}
        onTableAsked={() => setTable(!isTable)}
        table={
          <DataTable
            caption="Passing 2 mm by gap"
            rows={[16, 20, 24, 28, 32]}
            rowKey={(gap) => gap}
            columns={[
              { key: 'gap', header: 'Gap', unit: 'mm', numeric: true, cell: (gap) => gap },
              ...[140, 150, 160, 170].map((kv) => ({
                key: String(kv),
                header: `${kv} kV`,
                numeric: true,
                cell: (gap: number) => formatNumber(passing(kv, gap), 1),
              })),
            ]}
          />
        }
      />
      {!isTable && <MapLegend map={SAMPLE_MAP} />}
    </Panel>
  );
}
