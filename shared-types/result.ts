/** What was wrong with something that came from outside: which thing, its value, and what would be right. */
export interface Problem {
  /** Path of the thing that is wrong, such as `parts[2].shape.outerMm`; empty for the whole document. */
  readonly where: string;
  /** One sentence for a person: names the thing, its value and the allowed range. */
  readonly message: string;
}

/** A value, or the reasons why there is none. Used at every border: file, message, worker, form. */
export type Result<Value> = { readonly ok: true; readonly value: Value } | { readonly ok: false; readonly problems: readonly Problem[] };

/** @returns a successful result that carries `value`. */
export function success<Value>(value: Value): Result<Value> {
  return { ok: true, value };
}

/** @returns a failed result that carries one problem. */
export function failure<Value>(where: string, message: string): Result<Value> {
  return { ok: false, problems: [{ where, message }] };
}
