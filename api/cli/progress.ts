/** One quiet line of progress on stderr: rewritten in place on a terminal, plain lines elsewhere; nothing in the first second. */

import type { Progress } from "../../meshes/predict.ts";

/** Where the line goes. */
export interface ProgressSink {
  write(text: string): unknown;
  readonly isTTY?: boolean | undefined;
  readonly columns?: number | undefined;
}

/** Quick work stays silent this long, ms. */
const patience = 1000;
const clearLine = "\r\u001b[2K";

export interface ProgressLine {
  report(progress: Progress): void;
  /** Takes the line away; must be called before anything else is written. */
  close(): void;
}

/** Starts the clock. The latest report is shown once the patience is over, and every new stage from then on. */
export function progressLine(sink: ProgressSink): ProgressLine {
  let latest: Progress | null = null;
  let shown = "";
  const show = (): void => {
    if (latest === null) return;
    const text = `${latest.stage} (${Math.round(100 * latest.fraction)} %)`;
    if (sink.isTTY) {
      sink.write(clearLine + text.slice(0, (sink.columns ?? 80) - 1));
    } else if (latest.stage !== shown) {
      sink.write(`${text}\n`);
    }
    shown = latest.stage;
  };
  let late = false;
  const timer = setTimeout(() => {
    late = true;
    show();
  }, patience);
  timer.unref();
  return {
    report(progress) {
      // The end needs no words: the answer follows at once.
      if (progress.fraction >= 1) return;
      latest = progress;
      if (late) show();
    },
    close() {
      clearTimeout(timer);
      if (sink.isTTY && shown !== "") sink.write(clearLine);
    },
  };
}
