import type { ReactNode, Ref } from 'react';

export type ButtonLook = 'solid' | 'line' | 'stop' | 'plain';

const frame =
  'inline-flex items-center justify-center gap-2 rounded-md border-[1.5px] px-4 py-2 font-semibold no-underline';
const shape = `${frame} min-h-button text-ui max-wide:min-h-target`;
const solid = 'border-deep bg-deep text-on-deep hover:border-ink hover:bg-ink hover:text-foam';
const looks: Record<ButtonLook, string> = {
  solid: `${shape} ${solid}`,
  line: `${shape} border-deep bg-transparent text-deep hover:bg-wash`,
  stop: `${shape} border-anemone bg-transparent text-anemone hover:bg-wash`,
  plain:
    'inline-flex min-h-7 items-center px-0.5 py-1 text-sm font-medium text-deep underline decoration-1 underline-offset-[3px] max-wide:min-h-target',
};
const busyLook = `${shape} border-edge bg-wash text-barnacle`;

interface ButtonProps {
  readonly look?: ButtonLook;
  /** As wide as its place on narrow screens. */
  readonly isWideOnPhone?: boolean;
  /** Work is under way: it stays where it is, keeps the focus, and does nothing more. */
  readonly isBusy?: boolean;
  /** The id of the words on the page that say why it cannot be pressed now; it keeps the focus. */
  readonly whyNotId?: string | undefined;
  readonly onPress?: () => void;
  readonly ref?: Ref<HTMLButtonElement>;
  readonly children: ReactNode;
}

/** A button that does something here. What goes elsewhere is a link. */
export function Button(props: ButtonProps) {
  const { look = 'solid', isWideOnPhone = false, isBusy = false, onPress, ref, children } = props;
  const isResting = isBusy || props.whyNotId !== undefined;
  return (
    <button
      ref={ref}
      type="button"
      className={`${isResting && look !== 'plain' ? busyLook : looks[look]}${isWideOnPhone ? ' max-wide:w-full' : ''}`}
      aria-disabled={isResting || undefined}
      aria-describedby={props.whyNotId}
      onClick={isResting ? undefined : onPress}
    >
      {children}
    </button>
  );
}

/** A link off this application, or one that must load a page, drawn as a button. */
export function ButtonLink({ href, children }: { href: string; children: ReactNode }) {
  return (
    <a className={`${frame} ${solid} min-h-13 w-full text-md`} href={href}>
      {children}
    </a>
  );
}
