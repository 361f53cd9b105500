/** The answer of a rule: granted with what follows from it, or refused with every reason at once. */
export type Verdict<Granted, Reason> =
  | { readonly isGranted: true; readonly value: Granted }
  | { readonly isGranted: false; readonly reasons: readonly [Reason, ...Reason[]] };

/** A granted verdict that carries what follows from it. */
export function granted<Granted>(value: Granted): Verdict<Granted, never> {
  return { isGranted: true, value };
}

/** A refused verdict. There is always at least one reason. */
export function refused<Reason>(first: Reason, ...rest: readonly Reason[]): Verdict<never, Reason> {
  return { isGranted: false, reasons: [first, ...rest] };
}
