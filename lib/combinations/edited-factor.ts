/** A factor as typed on screen, with a point or a comma, − or -; null where it is no number from −100 to 100. */
export function editedFactor(text: string): number | null {
  const plain = text.trim().replace('−', '-').replace(',', '.');
  if (!/^[-+]?(\d+\.?\d*|\.\d+)$/.test(plain)) return null;
  const value = Number(plain);
  return Math.abs(value) <= 100 ? value : null;
}
