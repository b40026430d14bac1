/** How many failed sign-in attempts are let through before one must wait: for an account, and from an address. */
export const attemptRule = { window_ms: 15 * 60_000, perAccount: 10, perAddress: 60 } as const;

/**
 * Whether the next attempt must wait, by the failures within the window. An account that does not exist is
 * counted like one that does, so that waiting says nothing about who has one.
 */
export function mustWait(failures: { readonly ofAccount: number; readonly fromAddress: number }): boolean {
  return failures.ofAccount >= attemptRule.perAccount || failures.fromAddress >= attemptRule.perAddress;
}

/** How often a new password may be asked for within an hour: for an account, whether it exists or not, and from an address. */
export const resetRule = { window_ms: 3_600_000, perAccount: 5, perAddress: 20 } as const;
