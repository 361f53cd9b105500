import { useState } from 'react';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import type { RadioChoice } from '#frontend/components/radio-list.tsx';
import { RadioList } from '#frontend/components/radio-list.tsx';
import { counted } from '#frontend/words/number-words.ts';
import { positionInWords } from '#frontend/words/position-words.ts';
import type { Reply } from '#frontend/api/call.ts';
import type { ShorePreview } from './use-shore-preview.ts';

type Station = Reply<'findStations'>['stations'][number];

/** The tide station of a shore, chosen from the nearest to its position. */
export function StationChoice(props: {
  readonly stations: ShorePreview['stations'];
  readonly value: string;
  readonly error: string | undefined;
  readonly onChoose: (station: { readonly id: string; readonly zone: string | null }) => void;
}) {
  const { stations, value, error, onChoose } = props;
  const [isOpen, setIsOpen] = useState(value === '');
  if (stations.data === undefined) {
    return (
      <div className="text-ui">
        <p className="text-sm font-medium">Tide station</p>
        <WithoutStations stations={stations} value={value} />
        {error !== undefined && <p className="text-sm font-medium text-anemone">{error}</p>}
      </div>
    );
  }
  const near = stations.data.stations;
  const isNear = value === '' || near.some(({ stationId }) => stationId === value);
  const kept: RadioChoice[] = isNear
    ? []
    : [{ value, words: value, detail: 'Chosen, and not among the nearest to this position.' }];
  const offered = isOpen ? near : near.filter(({ stationId }) => stationId === value);
  const others = near.length - offered.length;
  return (
    <div>
      <RadioList
        label="Tide station"
        hint="The nearest that may be used. A name may be its neighbour's: check id and position."
        value={value}
        error={error}
        choices={[
          ...kept,
          ...offered.map((station) => ({
            value: station.stationId,
            words: `${station.stationName}, ${kilometres(station.distanceKm)}`,
            detail: <StationDetail station={station} />,
          })),
        ]}
        onChange={(id) =>
          onChoose({ id, zone: near.find(({ stationId }) => stationId === id)?.zone ?? null })
        }
      />
      {others > 0 && (
        <Button look="plain" onPress={() => setIsOpen(true)}>
          {`Show ${counted(others, 'other tide station')} near`}
        </Button>
      )}
    </div>
  );
}

function StationDetail({ station }: { station: Station }) {
  return (
    <>
      <p className="break-all tabular-nums">{station.stationId}</p>
      <p className="tabular-nums">{`${positionInWords(station)}, heights above ${station.datum}`}</p>
      <details>
        <summary className="cursor-pointer text-deep">{station.licence}</summary>
        <p className="text-xs">{station.attribution}</p>
      </details>
    </>
  );
}

function WithoutStations(props: {
  readonly stations: ShorePreview['stations'];
  readonly value: string;
}) {
  const { stations, value } = props;
  if (stations.error !== null) {
    return (
      <>
        <p className="text-anemone">{sayProblem(stations.error)}</p>
        <Button look="plain" onPress={() => void stations.refetch()}>
          Try again
        </Button>
      </>
    );
  }
  if (stations.isFetching) return <LoadingWash what="tide stations" />;
  return (
    <p className="text-barnacle">
      {value === '' ? '' : `${value}. `}The nearest are offered once the position is written.
    </p>
  );
}

function kilometres(distanceKm: number): string {
  return `${distanceKm < 10 ? distanceKm.toFixed(1) : Math.round(distanceKm)} km away`;
}
