import { Select } from '#frontend/components/select.tsx';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import { Tick } from '#frontend/components/tick.tsx';
import type { CalendarView } from '#shared/contracts/sessions.ts';
import type { CalendarAddress } from './calendar-address.ts';

const ALL = '';

/** Which sessions the calendar shows: of one shore, only the reader's own, only those with gaps. */
export function CalendarFilters(props: {
  readonly shores: CalendarView['shores'];
  readonly address: CalendarAddress;
  readonly onChange: (name: 'shore' | 'mine' | 'gaps', value: string | null) => void;
}) {
  const { shores, address, onChange } = props;
  const isWide = useWideScreen();
  return (
    <div
      role="group"
      aria-label="Show"
      className="flex flex-wrap items-center gap-x-5 gap-y-1 max-wide:gap-x-4 wide:ml-auto"
    >
      <Select
        name="Shore"
        value={address.shoreId ?? ALL}
        choices={[
          { value: ALL, words: 'All shores' },
          ...shores.map(({ id, name }) => ({ value: id, words: name })),
        ]}
        onChange={(shoreId) => onChange('shore', shoreId === ALL ? null : shoreId)}
      />
      <Tick
        words={isWide ? 'Only mine' : 'Mine'}
        isTicked={address.onlyMine}
        onChange={(isTicked) => onChange('mine', isTicked ? '1' : null)}
      />
      <Tick
        words={isWide ? 'Only gaps' : 'Gaps'}
        isTicked={address.onlyGaps}
        onChange={(isTicked) => onChange('gaps', isTicked ? '1' : null)}
      />
    </div>
  );
}
