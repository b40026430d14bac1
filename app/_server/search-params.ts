export type SearchParams = Readonly<Record<string, string | string[] | undefined>>;

/** A page's query as it stood in the address. */
export function toParams(record: SearchParams): URLSearchParams {
  const params = new URLSearchParams();
  for (const [key, values] of Object.entries(record)) for (const value of [values ?? []].flat()) params.append(key, value);
  return params;
}
