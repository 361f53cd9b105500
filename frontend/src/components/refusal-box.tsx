import type { ReactNode } from 'react';

/** A no with its reasons: what was refused, and under it everything that stands against it. */
export function RefusalBox({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="mt-2.5 rounded-md bg-wash px-3 pt-2.5 pb-1.5 text-ui wide:px-4">
      <p className="font-semibold">{title}</p>
      <ul>{children}</ul>
    </div>
  );
}

/** One reason: its drawing, if it has one, its sentence, and what would mend it. */
export function RefusalReason(props: {
  readonly drawing: ReactNode | null;
  readonly sentence: ReactNode;
  readonly mend: string;
}) {
  return (
    <li className="flex items-start gap-3.5 border-hair py-2 wide:items-center [li+&]:border-t">
      {props.drawing}
      <div className="min-w-0">
        <p>{props.sentence}</p>
        <p className="text-barnacle">{props.mend}</p>
      </div>
    </li>
  );
}
