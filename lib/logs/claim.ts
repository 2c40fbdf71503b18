/**
 * A value the log states, with the line that stated it first; two different statements cancel each other. A class,
 * because a long log makes many: methods on the prototype keep them small.
 */
export class Claim<T> {
  private first: T | null = null;
  private firstLine: number | null = null;
  private contradiction: number | null = null;

  state(value: T, line: number): void {
    if (this.firstLine === null) {
      this.first = value;
      this.firstLine = line;
    } else if (this.contradiction === null && !Object.is(this.first, value)) this.contradiction = line;
  }

  /** The value, null when nothing or two things were stated. */
  get value(): T | null {
    return this.contradiction === null ? this.first : null;
  }

  /** Line of the first statement. */
  get line(): number | null {
    return this.firstLine;
  }

  /** Line of the statement that contradicts the first one, else null. */
  get contradictedAt(): number | null {
    return this.contradiction;
  }
}

export function createClaim<T>(): Claim<T> {
  return new Claim<T>();
}
