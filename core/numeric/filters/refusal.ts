/**
 * A filter that cannot do what it was asked. Carries the parts of a notice (tag "band"), so that a caller that knows study
 * and file turns it into the application's error unchanged: `new Fault(refusal.parts, { cause: refusal })`.
 */
export class FilterRefusal extends Error {
  readonly parts: {
    readonly tag: "band";
    readonly where: string;
    readonly expected: string;
    readonly got: string;
    readonly advice: string;
  };

  constructor(where: string, expected: string, got: string, advice: string) {
    super(`${where}: expected ${expected}, got ${got}; ${advice}`);
    this.name = "FilterRefusal";
    this.parts = { tag: "band", where, expected, got, advice };
  }
}
