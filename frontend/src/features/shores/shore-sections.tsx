import type { ReactNode } from 'react';
import {
  FieldGroup,
  NumberField,
  TextArea,
  TextField,
  TimeField,
} from '#frontend/components/field.tsx';
import { RadioList } from '#frontend/components/radio-list.tsx';
import { ratioWords } from './ratio-words.ts';
import type { DraftErrors, DraftPath, ShoreDraft } from './shore-draft.ts';
import { StationChoice } from './station-choice.tsx';
import type { ShorePreview } from './use-shore-preview.ts';

/** A shore that is being written: what stands in its fields, what is wrong, and a way to write. */
export interface Writing {
  readonly draft: ShoreDraft;
  readonly errors: DraftErrors;
  readonly onWrite: (changes: Partial<ShoreDraft>) => void;
}

/** What a field is given: its value, what is wrong with it, and a way to change it. */
function at({ draft, errors, onWrite }: Writing, path: DraftPath) {
  return {
    value: draft[path],
    error: errors[path],
    onChange: (value: string) => onWrite({ [path]: value }),
  };
}

function Pair({ children }: { children: ReactNode }) {
  return <div className="grid grid-cols-2 items-start gap-3">{children}</div>;
}

function Words({ children }: { children: ReactNode }) {
  return <p className="text-sm text-barnacle">{children}</p>;
}

export function PlaceSection(props: {
  readonly writing: Writing;
  readonly stations: ShorePreview['stations'];
}) {
  const { writing, stations } = props;
  const { draft, errors, onWrite } = writing;
  return (
    <FieldGroup legend="Where it is">
      <TextField label="Name" {...at(writing, 'name')} />
      <Pair>
        <NumberField label="Latitude" unit="°" keys="text" {...at(writing, 'latitude')} />
        <NumberField label="Longitude" unit="°" keys="text" {...at(writing, 'longitude')} />
      </Pair>
      <Words>Degrees and decimals; south and west with a minus.</Words>
      <StationChoice
        stations={stations}
        value={draft.tideStationId}
        error={errors.tideStationId}
        onChoose={({ id, zone }) =>
          onWrite({
            tideStationId: id,
            ...(zone !== null && draft.zone.trim() === '' ? { zone } : {}),
          })
        }
      />
      <TextField label="Time zone" placeholder="Europe/London" {...at(writing, 'zone')} />
    </FieldGroup>
  );
}

export function DifferencesSection({ writing }: { writing: Writing }) {
  return (
    <FieldGroup legend="Differences">
      <Words>From the tide station to this shore; a minus where it is earlier or lower.</Words>
      <Pair>
        <NumberField
          label="High water later by"
          unit="min"
          keys="text"
          {...at(writing, 'differences.high.laterMinutes')}
        />
        <NumberField
          label="High water higher by"
          unit="m"
          keys="text"
          {...at(writing, 'differences.high.higherM')}
        />
        <NumberField
          label="Low water later by"
          unit="min"
          keys="text"
          {...at(writing, 'differences.low.laterMinutes')}
        />
        <NumberField
          label="Low water higher by"
          unit="m"
          keys="text"
          {...at(writing, 'differences.low.higherM')}
        />
      </Pair>
    </FieldGroup>
  );
}

export function WaterSection(props: { readonly writing: Writing; readonly datum: string | null }) {
  const { writing, datum } = props;
  return (
    <FieldGroup legend="Water">
      <Words>
        {`The lower shore can be worked while the water stands at the working level or below. At the cut-off level the way off is under water. Levels are ${datum === null ? 'above the datum of the tide station' : `above ${datum}`}.`}
      </Words>
      <Pair>
        <NumberField label="Working level" unit="m" keys="text" {...at(writing, 'workingLevelM')} />
        <NumberField label="Cut-off level" unit="m" keys="text" {...at(writing, 'cutOffLevelM')} />
        <NumberField
          label="Before low water"
          unit="min"
          keys="numeric"
          {...at(writing, 'minutesBeforeLow')}
        />
        <NumberField
          label="After low water"
          unit="min"
          keys="numeric"
          {...at(writing, 'minutesAfterLow')}
        />
        <NumberField
          label="Daylight margin"
          unit="min"
          keys="numeric"
          {...at(writing, 'daylightMarginMinutes')}
        />
        <NumberField
          label="No shorter than"
          unit="min"
          keys="numeric"
          {...at(writing, 'minimumMinutes')}
        />
        <TimeField label="On the shore from" {...at(writing, 'earliestClock')} />
        <TimeField label="Off the shore by" {...at(writing, 'latestClock')} />
      </Pair>
    </FieldGroup>
  );
}

export function MeetingSection({ writing }: { writing: Writing }) {
  return (
    <FieldGroup legend="Meeting">
      <TextArea label="Meeting place" rows={2} {...at(writing, 'meetingPlace')} />
      <Words>Before the start:</Words>
      <Pair>
        <NumberField
          label="Crew meet"
          unit="min"
          keys="numeric"
          {...at(writing, 'crewMeetsMinutes')}
        />
        <NumberField
          label="Party meets"
          unit="min"
          keys="numeric"
          {...at(writing, 'partyMeetsMinutes')}
        />
      </Pair>
    </FieldGroup>
  );
}

export function GroundSection({ writing }: { writing: Writing }) {
  return (
    <FieldGroup legend="On the ground">
      <TextArea label="Hazards" {...at(writing, 'hazards')} />
      <TextArea label="Ways off" {...at(writing, 'waysOff')} />
      <TextArea label="Phone signal" rows={2} {...at(writing, 'phoneSignal')} />
      <TextArea
        label="Emergency words"
        hint="Whom to ring and what to say, as it is read on the shore."
        {...at(writing, 'emergencyWords')}
      />
    </FieldGroup>
  );
}

export function RatioSection({ writing }: { writing: Writing }) {
  return (
    <FieldGroup legend="Adults to party">
      <RadioList
        label="How many adults a party needs"
        {...at(writing, 'ratioPreset')}
        choices={Object.entries(ratioWords).map(([value, { name, sentence }]) => ({
          value,
          words: name,
          detail: <p>{sentence}</p>,
        }))}
      />
    </FieldGroup>
  );
}
