import type { ResponseJson } from '@shared/schemas/response';
import { useState, type ReactNode } from 'react';
import { ChartFrame } from '@/charts/Chart';
import { ContourMap, type MapHandlers } from '@/charts/map/ContourMap';
import type { MapInput } from '@/charts/map/mapInput';
import { MapLegend } from '@/charts/map/MapLegend';
import { Panel } from '@/components/Panel';
import { formatNumber } from '@/lib/format';

const HEIGHT = 440;
/** Every so many columns and rows of the lattice stand in the table. */
const EVERY = 10;

interface MapPanelProps extends Omit<MapHandlers, 'onTableAsked'> {
  readonly response: ResponseJson;
  readonly map: MapInput | null;
  readonly isFeasible: readonly (readonly boolean[])[];
  readonly reading: string;
  readonly fact: string;
  readonly control: ReactNode;
  /** Stands in place of the map until there is one. */
  readonly children: ReactNode;
}

function tableOf(response: ResponseJson, map: MapInput, feasible: MapPanelProps['isFeasible']) {
  const picked = (values: readonly number[]) =>
    values.flatMap((value, i) => (i % EVERY === 0 ? [{ value, i }] : []));
  const rows = picked(map.y.values).flatMap(({ value: v, i: j }) =>
    picked(map.x.values).map(({ value: u, i }) => ({
      u,
      v,
      predicted: map.z[j]?.[i] ?? null,
      isFeasible: feasible[j]?.[i] ?? false,
    })),
  );
  type Row = (typeof rows)[number];
  return {
    columns: [
      {
        key: 'x',
        header: map.x.label,
        unit: map.x.unit,
        numeric: true,
        cell: ({ u }: Row) => formatNumber(u, 1),
      },
      {
        key: 'y',
        header: map.y.label,
        unit: map.y.unit,
        numeric: true,
        cell: ({ v }: Row) => formatNumber(v, 1),
      },
      {
        key: 'z',
        header: response.name,
        unit: response.unit,
        numeric: true,
        cell: ({ predicted }: Row) => formatNumber(predicted, 1),
      },
      {
        key: 'f',
        header: 'Can be dialled in',
        cell: ({ isFeasible }: Row) => (isFeasible ? 'yes' : 'no'),
      },
    ],
    rows,
    rowKey: ({ u, v }: Row) => `${u} ${v}`,
  };
}

/** The map of one response with its keys and its table. */
export function MapPanel(props: MapPanelProps) {
  const { response, map, isFeasible, reading, fact, control, children, ...handlers } = props;
  const [isTable, setIsTable] = useState(false);
  const label = `Contour map of ${response.name}`;
  return (
    <Panel name={response.name} fact={fact} control={control}>
      {children}
      {map && (
        <>
          <ChartFrame
            label={label}
            isInteractive
            view={{ isTable, onSwitched: setIsTable }}
            table={tableOf(response, map, isFeasible)}
          >
            <ContourMap
              map={map}
              label={label}
              height={HEIGHT}
              reading={reading}
              {...handlers}
              onTableAsked={() => setIsTable(true)}
            />
          </ChartFrame>
          {!isTable && <MapLegend map={map} />}
        </>
      )}
    </Panel>
  );
}
