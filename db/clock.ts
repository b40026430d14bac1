/** This instant, as the database writes it: ISO 8601 in UTC, which sorts as text. */
export const instant = (): string => new Date().toISOString();
