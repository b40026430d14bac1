/** Whose turn it is: offices one after the other, within an office the work that was asked for first. */
export class Turns<Work extends { readonly office: number; readonly patient?: boolean }> {
  private readonly works: Work[] = [];
  /** The office served last; the next one after it in order of arrival comes first. */
  private last: number | null = null;

  add(work: Work): void {
    this.works.push(work);
  }

  remove(work: Work): void {
    const at = this.works.indexOf(work);
    if (at >= 0) this.works.splice(at, 1);
  }

  all(): readonly Work[] {
    return this.works;
  }

  /**
   * The first piece that anyone has to give, asking office after office from the one behind the last served, and
   * within an office its work in order of arrival, patient work after the other.
   *
   * @param take a piece of that work, or null where it has none to give now
   */
  async next<Piece>(take: (work: Work) => Promise<Piece | null> | Piece | null): Promise<Piece | null> {
    const offices = [...new Set(this.works.map((work) => work.office))].sort((a, b) => a - b);
    const from = this.last === null ? 0 : offices.findIndex((office) => office > this.last!);
    const order = from <= 0 ? offices : [...offices.slice(from), ...offices.slice(0, from)];
    for (const office of order)
      for (const work of this.ofOffice(office)) {
        const piece = await take(work);
        if (piece === null) continue;
        this.last = office;
        return piece;
      }
    return null;
  }

  private ofOffice(office: number): readonly Work[] {
    const own = this.works.filter((each) => each.office === office);
    return [...own.filter((each) => !each.patient), ...own.filter((each) => each.patient)];
  }
}
