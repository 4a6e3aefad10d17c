/** What the command ends with: 0 done · 1 a fault of ours · 2 file or options wrong · 3 a valid setup that cannot be planned. */
export const EXIT = { done: 0, fault: 1, wrong: 2, cannotPlan: 3 } as const;

/** A message for the user with the exit code that goes with it. */
export class Refusal extends Error {
  constructor(
    readonly exitCode: number,
    message: string,
  ) {
    super(message);
  }
}

/** @returns the refusal of a file or an option that is wrong; the message names it, its value and what is allowed. */
export const wrong = (message: string): Refusal => new Refusal(EXIT.wrong, message);
