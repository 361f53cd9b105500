import type { ReactNode } from 'react';
import { textScale } from '#frontend/components/root-font.ts';
import { useMeasuredWidth } from '#frontend/components/use-measured-width.ts';

const ROOMY_PX = 1200;

/** The page of a plan: its rules at the left of its dates where there is room, else above them. */
export function PlanFrame(props: {
  readonly rules: (isRoomy: boolean) => ReactNode;
  readonly dates: ReactNode;
  /** What stands at the foot of the screen where the rules are not at the side. */
  readonly foot: ReactNode;
}) {
  const [ref, widthPx] = useMeasuredWidth<HTMLDivElement>();
  const isRoomy = widthPx !== null && widthPx >= ROOMY_PX * textScale();
  return (
    <div ref={ref} className="px-4 pt-1 pb-10 wide:px-page wide:pt-5.5">
      {widthPx !== null && (
        <>
          <div
            className={
              isRoomy ? 'grid grid-cols-[18.25rem_minmax(0,1fr)] gap-12' : 'max-wide:pb-20'
            }
          >
            <div className="min-w-0">{props.rules(isRoomy)}</div>
            <div className={isRoomy ? 'min-w-0' : 'mt-3 min-w-0'}>{props.dates}</div>
          </div>
          {!isRoomy && props.foot !== null && (
            <div className="fixed inset-x-0 bottom-foot z-10 border-t border-hair bg-foam px-4 py-2.5 wide:sticky wide:bottom-0 wide:mt-4 wide:px-0">
              {props.foot}
            </div>
          )}
        </>
      )}
    </div>
  );
}
