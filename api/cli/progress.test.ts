import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { progressLine } from "./progress.ts";

describe("the progress line", () => {
  beforeEach(() => vi.useFakeTimers());
  afterEach(() => vi.useRealTimers());

  const start = (isTTY: boolean) => {
    const written: string[] = [];
    const line = progressLine({ write: (text) => written.push(text), isTTY, columns: 30 });
    return { line, written };
  };

  it("keeps silent in the first second", () => {
    const { line, written } = start(false);
    line.report({ fraction: 0.1, stage: "first grid" });
    vi.advanceTimersByTime(900);
    line.close();
    vi.advanceTimersByTime(5000);
    expect(written).toEqual([]);
  });

  it("then writes a line a stage where nobody watches", () => {
    const { line, written } = start(false);
    line.report({ fraction: 0.1, stage: "first grid" });
    vi.advanceTimersByTime(1000);
    line.report({ fraction: 0.2, stage: "first grid" });
    line.report({ fraction: 0.5, stage: "second grid of three, R within 0.6 %" });
    line.close();
    expect(written).toEqual(["first grid (10 %)\n", "second grid of three, R within 0.6 % (50 %)\n"]);
  });

  it("rewrites one line on a terminal, cut to its width, and takes it away", () => {
    const { line, written } = start(true);
    vi.advanceTimersByTime(1000);
    line.report({ fraction: 0.5, stage: "second grid of three, R within 0.6 %" });
    line.close();
    const esc = String.fromCharCode(27);
    expect(written).toEqual([`\r${esc}[2Ksecond grid of three, R withi`, `\r${esc}[2K`]);
  });
});
