/** What a run tells while it goes on; the commands decide how it is shown. */
export interface Reporter {
  /** Before anything is evaluated. */
  planned(plan: PlannedRun): void;
  /** After each part; `done` counts combinations, those of an earlier sitting included. */
  progress(done: number, total: number): void;
  /** A step other than evaluation begins: `assembling the table`. */
  step(what: string): void;
  /** Something the user should know: a retried part, a resumed run. */
  note(text: string): void;
  finished(run: FinishedRun): void;
}

export interface PlannedRun {
  readonly title: string;
  readonly folder: string;
  readonly combinations: number;
  readonly alreadyDone: number;
  readonly workers: number;
  readonly bytesNeeded: number;
  readonly bytesFree: number;
  readonly secondsExpected: number;
}

export interface FinishedRun {
  readonly folder: string;
  readonly combinations: number;
  readonly rows: number;
  readonly feasible: number;
  readonly seconds: number;
}
