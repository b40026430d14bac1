/** A bar on standard error where a person watches; nothing where nobody does. */
export class ProgressBar {
  private last = 0;

  constructor(
    private readonly total: number,
    private readonly stream: NodeJS.WriteStream = process.stderr,
    private readonly now: () => number = () => performance.now(),
    private readonly started = now(),
  ) {}

  show(done: number): void {
    if (!this.stream.isTTY) return;
    const time = this.now();
    if (done < this.total && time - this.last < 80) return;
    this.last = time;
    this.stream.write(`\r\u001b[K${progressLine(done, this.total, (time - this.started) / 1000)}`);
  }

  end(): void {
    if (this.stream.isTTY) this.stream.write('\r\u001b[K');
  }
}

/** "[########............] 412 of 1,000 frames · 320/s · 2 s left" */
export function progressLine(done: number, total: number, seconds: number): string {
  const filled = total === 0 ? 20 : Math.floor((20 * done) / total);
  const rate = seconds > 0 ? done / seconds : 0;
  const count = (n: number): string => Math.round(n).toLocaleString('en-GB');
  const left = rate > 0 && done < total ? ` · ${count(Math.ceil((total - done) / rate))} s left` : '';
  return `[${'#'.repeat(filled)}${'.'.repeat(20 - filled)}] ${count(done)} of ${count(total)} frames · ${count(rate)}/s${left}`;
}
