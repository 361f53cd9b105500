/** How a person stands in one competency, as the gauge draws it. */
export type GaugeState = 'current' | 'renew-by' | 'lapsed' | 'not-held';

const WALL = 'M2 2V38.5Q2 42 5.5 42H12.5Q16 42 16 38.5V2';
const FLOOR = 42;
const FULL = 40;
const LEAST_WATER = 0.06;
const LEAST_NOTCH = 0.08;
const WITHOUT_END = 0.97;

interface LevelGaugeProps {
  readonly state: GaugeState;
  /** Share of the validity that is left, 0 to 1; null without an end. */
  readonly shareLeft: number | null;
  /** Notice days as a share of the validity, 0 to 1; null where there is no notice. */
  readonly noticeShare: number | null;
  readonly heightPx?: number;
  /** What it says where it stands alone; beside its words it is left out and the gauge is hidden. */
  readonly label?: string;
}

/**
 * The validity that is left as water in a glass of 40 units: never under 2.4 while it is current,
 * the notch of the notice never under 3.2. Lapsed is dry and cracked, not held is dashed.
 */
export function LevelGauge(props: LevelGaugeProps) {
  const { state, shareLeft, noticeShare, heightPx = 40, label } = props;
  const isWet = state === 'current' || state === 'renew-by';
  const notchY = noticeShare === null ? null : levelY(Math.max(noticeShare, LEAST_NOTCH));
  return (
    <svg
      className="block flex-none"
      data-gauge={state}
      viewBox="0 0 22 44"
      width={heightPx / 2}
      height={heightPx}
      {...(label === undefined ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label })}
    >
      {isWet && <path className="fill-tide" d={waterIn(shareLeft ?? WITHOUT_END)} />}
      <path
        className="fill-none stroke-edge"
        strokeWidth="1.5"
        strokeLinecap="round"
        strokeDasharray={state === 'not-held' ? '2.5 3.2' : undefined}
        d={WALL}
      />
      {state === 'current' && shareLeft !== null && notchY !== null && (
        <path className="stroke-ink" strokeWidth="1.75" d={`M16 ${notchY}H21`} />
      )}
      {state === 'renew-by' && notchY !== null && (
        <path
          className="stroke-wrack"
          strokeWidth="2"
          d={`M4 ${notchY}H7.4M10 ${notchY}H13.4M16 ${notchY}H21.5`}
        />
      )}
      {state === 'lapsed' && (
        <path
          className="fill-none stroke-anemone"
          strokeWidth="1.9"
          strokeLinejoin="round"
          d="M11.4 2.6L6.2 11L11.8 18.6L6 27L10.6 33L8.4 41"
        />
      )}
    </svg>
  );
}

function levelY(share: number): number {
  return Math.round((FLOOR - FULL * Math.min(1, share)) * 10) / 10;
}

function waterIn(share: number): string {
  const top = levelY(Math.max(share, LEAST_WATER));
  const corner = Math.max(top, 38.4);
  return `M2.7 ${top}Q6 ${(top - 1.6).toFixed(1)} 9 ${top}T15.3 ${top}V${corner}Q15.3 41.4 12.4 41.4H5.6Q2.7 41.4 2.7 ${corner}Z`;
}
