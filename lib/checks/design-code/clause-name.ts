/** A design code's check is named by its clause: "6.3.1 flexural buckling", "E3 flexural buckling". */
const clauseName = /^(\d|[A-H]\d)/;

/** Whether a check is a clause of a design code, by its name. */
export const isClause = (check: string): boolean => clauseName.test(check);
