import type { ReactNode } from 'react';
import { TideCredit } from '#frontend/components/tide-credit.tsx';
import { counted, listed } from '#frontend/words/number-words.ts';
import { positionInWords } from '#frontend/words/position-words.ts';
import { metres } from '#frontend/words/tide-words.ts';
import type { ShoreView } from '#shared/contracts/shores.ts';
import { ratioWords } from './ratio-words.ts';

const MINUTE = 'minute';

/** The settings of a shore for those who do not change them. */
export function ShoreFacts({ shore }: { shore: ShoreView }) {
  const { settings, source } = shore;
  const ratio = ratioWords[settings.ratioPreset];
  const span = (minutes: number): string =>
    minutes < 14 ? counted(minutes, MINUTE) : `${minutes} minutes`;
  return (
    <div className="mt-5 grid gap-x-14 gap-y-7 wide:grid-cols-2">
      <Facts title="Meeting">
        <Fact name="Meeting place">{settings.meetingPlace}</Fact>
        <Fact name="Crew meet">{span(settings.crewMeetsMinutes)} before the start</Fact>
        <Fact name="Party meets">{span(settings.partyMeetsMinutes)} before the start</Fact>
      </Facts>
      <Facts title="On the ground">
        <Fact name="Hazards">{settings.hazards}</Fact>
        <Fact name="Ways off">{settings.waysOff}</Fact>
        <Fact name="Phone signal">{settings.phoneSignal}</Fact>
        <Fact name="Emergency words">{settings.emergencyWords}</Fact>
      </Facts>
      <Facts title="Water">
        <Fact name="Working level">{metres(settings.workingLevelM)} m</Fact>
        <Fact name="Cut-off level">{metres(settings.cutOffLevelM)} m</Fact>
        <Fact name="Working window">
          {`From ${span(settings.minutesBeforeLow)} before to ${span(settings.minutesAfterLow)} after low water, no shorter than ${span(settings.minimumMinutes)}`}
        </Fact>
        <Fact name="Daylight margin">{span(settings.daylightMarginMinutes)}</Fact>
        <Fact name="Hours">{`${settings.earliestClock} to ${settings.latestClock}`}</Fact>
      </Facts>
      <Facts title="Adults to party">
        <Fact name={ratio.name}>{ratio.sentence}</Fact>
      </Facts>
      <Facts title="Where it is">
        <Fact name="Position">{positionInWords(settings)}</Fact>
        <Fact name="Time zone">{settings.zone}</Fact>
        <Fact name="Tide station">
          {source === null
            ? `${settings.tideStationId}, which can no longer be used`
            : `${source.stationName}, ${positionInWords(source)}`}
        </Fact>
        <Fact name="High water">{differenceInWords(settings.differences.high)}</Fact>
        <Fact name="Low water">{differenceInWords(settings.differences.low)}</Fact>
      </Facts>
      {source !== null && (
        <section aria-labelledby="about-the-tides">
          <h2 id="about-the-tides" className="mb-1.5 border-t-[1.5px] border-ink pt-2">
            About the tides
          </h2>
          <TideCredit shown="The water of this shore" source={source} />
        </section>
      )}
    </div>
  );
}

/** For which years an official table is in force, in a sentence; nothing where for none. */
export function TableYears({ years }: { years: readonly number[] }) {
  if (years.length === 0) return null;
  return (
    <p className="text-ui">{`An official tide table is in force for ${listed(years.map(String))}.`}</p>
  );
}

function Facts({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="text-ui">
      <h2 className="border-t-[1.5px] border-ink pt-2">{title}</h2>
      <dl className="mt-1">{children}</dl>
    </section>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="grid gap-x-4 border-hair py-1.5 wide:grid-cols-[9rem_minmax(0,1fr)] [div+&]:border-t">
      <dt className="text-barnacle">{name}</dt>
      <dd className="min-w-0 whitespace-pre-line tabular-nums">
        {children === '' ? 'Nothing written yet' : children}
      </dd>
    </div>
  );
}

function differenceInWords(difference: {
  readonly laterMinutes: number;
  readonly higherM: number;
}): string {
  const { laterMinutes, higherM } = difference;
  if (laterMinutes === 0 && higherM === 0) return 'As at the tide station';
  const time =
    laterMinutes === 0
      ? 'at the same time'
      : `${Math.abs(laterMinutes)} minutes ${laterMinutes < 0 ? 'earlier' : 'later'}`;
  const height =
    higherM === 0
      ? 'as high'
      : `${metres(Math.abs(higherM))} m ${higherM < 0 ? 'lower' : 'higher'}`;
  return `${time}, ${height}`;
}
