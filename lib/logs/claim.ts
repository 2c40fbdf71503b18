/** A value the log states, with the line that stated it first; two different statements cancel each other. */
export type Claim<T> = {
  state(value: T, line: number): void;
  readonly value: T | null;
  readonly line: number | null;
  /** Line of the statement that contradicts the first one, else null. */
  readonly contradictedAt: number | null;
};

export function createClaim<T>(same: (a: T, b: T) => boolean = Object.is): Claim<T> {
  let first: { value: T; line: number } | null = null;
  let contradictedAt: number | null = null;
  return {
    state(value, line) {
      if (first === null) first = { value, line };
      else if (contradictedAt === null && !same(first.value, value)) contradictedAt = line;
    },
    get value() {
      return first === null || contradictedAt !== null ? null : first.value;
    },
    get line() {
      return first === null ? null : first.line;
    },
    get contradictedAt() {
      return contradictedAt;
    },
  };
}
