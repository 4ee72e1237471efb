/** How far certainties can be believed: per band of ten percent the time given that certainty and the share of it that was right. */
export class Reliability {
  private readonly time = new Array<number>(10).fill(0);
  private readonly right = new Array<number>(10).fill(0);
  private readonly certainty = new Array<number>(10).fill(0);
  private all = 0;
  private amongThree = 0;

  add(certainty: number, time: number, isRight: boolean, isAmongThree: boolean): void {
    const band = Math.min(9, Math.floor(certainty * 10));
    this.time[band] = (this.time[band] ?? 0) + time;
    this.certainty[band] = (this.certainty[band] ?? 0) + time * certainty;
    if (isRight) this.right[band] = (this.right[band] ?? 0) + time;
    this.all += time;
    if (isAmongThree) this.amongThree += time;
  }

  format(): string {
    const rows = this.time.map((time, band) => {
      const percent = (value: number) => (time > 0 ? ((100 * value) / time).toFixed(1) : '-').padStart(8);
      const share = ((100 * time) / Math.max(1e-9, this.all)).toFixed(1).padStart(10);
      return `${String(band * 10).padStart(3)}-${String(band * 10 + 10).padEnd(4)}${share}${percent(this.certainty[band] ?? 0)}${percent(this.right[band] ?? 0)}`;
    });
    const three = ((100 * this.amongThree) / Math.max(1e-9, this.all)).toFixed(1);
    return ['reliability (percent)', 'certainty  of time    mean   right', ...rows, `the reference is among the first three for ${three} % of the time`].join('\n');
  }
}
