/** How far back the pace is measured, in milliseconds, and how much of that it takes to judge. */
const WINDOW_MS = 1000;
const ENOUGH_MS = 300;
/** Below this share of the wanted pace playing is behind; above the other it is on time again. */
const BEHIND = 0.85;
const ON_TIME = 0.95;

/** Compares the time that frames were planned to take with the time that they took. */
export class Pace {
  private planned = 0;
  private marks: { at: number; planned: number }[] = [];

  /** Adds the time, in milliseconds, for which a frame is to stay on screen. */
  plan(milliseconds: number): void {
    this.planned += milliseconds;
  }

  /**
   * Notes that the planned frame is shown now and judges the last second.
   *
   * @param was the last judgement, which stands while there is too little to judge, and between the two thresholds
   */
  isBehind(now: number, was: boolean): boolean {
    this.marks.push({ at: now, planned: this.planned });
    while (this.marks.length > 2 && now - (this.marks[1]?.at ?? now) >= WINDOW_MS) this.marks.shift();
    const first = this.marks[0];
    if (first === undefined || now - first.at < ENOUGH_MS) return was;
    const share = (this.planned - first.planned) / (now - first.at);
    if (share < BEHIND) return true;
    return share > ON_TIME ? false : was;
  }
}
