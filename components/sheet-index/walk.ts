/** Steps through a list whose next page draws later than a key can be pressed again. */
export interface Walk {
  /** A step was asked for: 1 onwards, −1 back. */
  readonly step: (by: 1 | -1) => void;
  /** The page at this address has drawn, come to anew or drawn once more. */
  readonly drawn: (place: Place, anew: boolean) => void;
}

export interface Place {
  readonly here: string;
  readonly next: string | null;
  readonly previous: string | null;
  /** Leads to one of its neighbours. */
  readonly go: (href: string) => void;
}

/**
 * Keeps steps that were asked for while a page is on its way, so that `j` `k` comes back to where it began and `j` `j` goes two
 * on, whichever pages have drawn in between. A page that was come to otherwise begins anew.
 */
export function createWalk(): Walk {
  let at: Place | null = null;
  let wanted = 0;
  let underWay: string | null = null;
  const advance = () => {
    if (!at || wanted === 0) return;
    const href = wanted > 0 ? at.next : at.previous;
    if (href === null) {
      // the list ends here
      wanted = 0;
      return;
    }
    underWay = href;
    at.go(href);
  };
  return {
    step: (by) => {
      wanted += by;
      if (underWay === null) advance();
    },
    drawn: (place, anew) => {
      const before = at;
      at = place;
      if (!anew && before?.here === place.here) return;
      if (underWay === place.here) wanted -= before?.next === place.here ? 1 : -1;
      else wanted = 0;
      underWay = null;
      advance();
    },
  };
}
