/** How many sign-in attempts are let through, counted for an account and for an address alike. */
export interface AttemptRule {
  /** Failed attempts after which the key must wait. */
  readonly failures: number;
  /** Window in which they count, and how long the wait lasts, ms. */
  readonly window_ms: number;
}

interface Count {
  failures: number;
  firstAt: number;
}

/**
 * Counts failed attempts by key within a window; the clock is the caller's.
 * Holds at most `capacity` keys, the oldest dropped first, so that made-up names cannot fill the memory.
 */
export class AttemptLimit {
  private readonly counts = new Map<string, Count>();

  constructor(
    private readonly rule: AttemptRule,
    private readonly capacity = 20_000,
  ) {}

  /** @returns how long the key must still wait, ms; 0 = it may try */
  wait(key: string, now: number): number {
    const count = this.current(key, now);
    if (count === undefined || count.failures < this.rule.failures) return 0;
    return count.firstAt + this.rule.window_ms - now;
  }

  /** Counts an attempt before its password is looked at, so that attempts sent at once count too. */
  attempt(key: string, now: number): void {
    const count = this.current(key, now) ?? { failures: 0, firstAt: now };
    count.failures += 1;
    this.counts.delete(key);
    this.counts.set(key, count);
    if (this.counts.size > this.capacity) {
      const oldest = this.counts.keys().next();
      if (oldest.done !== true) this.counts.delete(oldest.value);
    }
  }

  /** Forgets a key after it signed in. */
  succeed(key: string): void {
    this.counts.delete(key);
  }

  private current(key: string, now: number): Count | undefined {
    const count = this.counts.get(key);
    if (count !== undefined && now - count.firstAt >= this.rule.window_ms) {
      this.counts.delete(key);
      return undefined;
    }
    return count;
  }
}
