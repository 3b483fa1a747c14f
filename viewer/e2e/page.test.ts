/**
 * The page in a real browser against the real service: describe, solve, look, change. Figures on the page are held against
 * the result documents of the service, which is tested elsewhere.
 */
import axe from "axe-core";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { heatColour } from "../../api/format/colour.ts";
import type { Result } from "../../meshes/result.ts";
import { launch, noBrowser } from "./browser.ts";
import { type Served, serve } from "./service.ts";

/** Long enough for a machine that is busy with other tests. */
const patience = 60_000;

let served: Served;
let browser: Browser;
let page: Page;
/** What the page complained of. */
const complaints: string[] = [];

describe.skipIf(noBrowser)("the page", { timeout: 120_000 }, () => {
  beforeAll(async () => {
    [served, browser] = await Promise.all([serve(), launch()]);
    page = await newPage();
    await page.goto(served.address);
  }, 180_000);

  afterAll(async () => {
    await browser?.close();
    await served?.close();
  });

  it("opens on the demo's figures, as the service has them", async () => {
    await expectReading(await newestResult());
    expect(await blank("Bore of the coil, mm").inputValue()).toBe("42");
  });

  it("has no accessibility fault that axe finds, light and dark, drawing and heat", async () => {
    for (const colorScheme of ["light", "dark"] as const) {
      await page.emulateMedia({ colorScheme });
      for (const view of ["Drawing", "Heat, flat", "Heat, cut away"]) {
        await show(view);
        expect(await axeFaults(), `${view}, ${colorScheme}`).toEqual([]);
      }
    }
    await page.emulateMedia({ colorScheme: "light" });
  });

  it("redraws what is typed, and refuses at the blank what cannot be wound", async () => {
    await blank("Bore of the coil, mm").fill("46");
    await page.getByRole("radio", { name: "Drawing" }).and(page.locator(":checked")).waitFor();
    await page.getByRole("button", { name: /bore.*46/i }).waitFor();
    await blank("Bore of the coil, mm").fill("20");
    await page
      .getByText(/overlaps|touches/)
      .first()
      .waitFor();
    expect(await page.getByRole("button", { name: "Solve", exact: true }).isDisabled()).toBe(true);
    const faults = await axeFaults();
    await blank("Bore of the coil, mm").fill("46");
    expect(faults, "refused").toEqual([]);
  });

  it("solves an edited value and shows what the service found", async () => {
    const before = await newestResult();
    await solve();
    const after = await newestResult();
    expect(winding(after)).toMatchObject({ boreDiameterMm: 46 });
    // A wider coil round the same part links more flux beside it.
    expect(after.empty.inductanceH.value).toBeGreaterThan(before.empty.inductanceH.value);
    await expectReading(after);
  });

  it("shows the heat in the legend's colours, cut away and flat, hot and cold", async () => {
    for (const view of ["Heat, cut away", "Heat, flat"]) {
      await show(view);
      await settled();
      const { hot, cold, coloured } = await heatPixels(view);
      expect(coloured, view).toBeGreaterThan(0.04);
      expect(hot, view).toBeGreaterThan(20);
      expect(cold, view).toBeGreaterThan(2000);
    }
  });

  it("reads out the value under the pointer", async () => {
    await show("Heat, flat");
    await settled();
    const box = (await picture("Heat, flat").boundingBox())!;
    await page.mouse.move(box.x + box.width / 2 + 4, box.y + box.height / 2);
    await page
      .getByRole("status", { name: "Value under the pointer" })
      .getByText(/W\/cm³/)
      .waitFor();
    expect(await page.getByRole("status", { name: "Value under the pointer" }).textContent()).toMatch(
      /chisel shank/,
    );
  });

  it("shows the same design and the same figures after a reload", async () => {
    const result = await newestResult();
    await blank("Turns").fill("6");
    await page.reload();
    await expectReading(result);
    expect(await blank("Turns").inputValue()).toBe("6");
    expect(await blank("Bore of the coil, mm").inputValue()).toBe("46");
    await page.getByText("The blanks have changed since").waitFor();
  });

  it("solves by keyboard alone, and a bare coil without a loaded column", async () => {
    await page.getByRole("button", { name: "Part 1: take away" }).focus();
    await page.keyboard.press("Enter");
    await page.getByLabel("What the drive fixes").selectOption({ label: "A of current" });
    await blank("Current, A").fill("300");
    await page.getByRole("button", { name: "Solve", exact: true }).focus();
    await page.keyboard.press("Enter");
    await solved();
    const result = await newestResult();
    expect(result.loaded).toBeNull();
    await expectReading(result);
    expect(await page.getByRole("columnheader", { name: "loaded", exact: true }).count()).toBe(0);
    expect(await axeFaults(), "no part").toEqual([]);
  });

  it("cancels a solve at work", async () => {
    await page.getByLabel("Start from").selectOption({ label: "washers" });
    await page.getByRole("button", { name: "Solve", exact: true }).click();
    await page.getByRole("progressbar").waitFor();
    await page.getByRole("button", { name: "Cancel" }).click();
    await page.getByText("Cancelled.").waitFor({ timeout: patience });
  });

  it("keeps the flat map where the browser has no WebGL", async () => {
    const plain = await launch("none");
    const other = await newPage(plain);
    const done = (await jobs()).find((job) => job.state === "done" && job.name.startsWith("Tarnhollow 01"));
    await other.goto(`${served.address}#job=${done?.id}`);
    await other.getByLabel("Heat, cut away", { exact: true }).first().check();
    await other.getByText(/WebGL/).first().waitFor({ timeout: patience });
    expect(await axeFaults(other), "no WebGL").toEqual([]);
    await other.getByRole("radio", { name: "Heat, flat" }).check();
    await other.locator("canvas").first().waitFor();
    await plain.close();
  });

  it("says when the service is gone, and goes on when it is back", async () => {
    await served.kill();
    await page.getByRole("button", { name: "Solve", exact: true }).click();
    await page.getByText("The service does not answer.").waitFor({ timeout: patience });
    expect(await axeFaults(), "service gone").toEqual([]);
    await served.again();
    await page.getByText("The service does not answer.").waitFor({ state: "detached", timeout: patience });
    await page.getByLabel("Start from").selectOption({ label: "ball" });
    await solve();
    await expectReading(await newestResult());
  });

  it("made the browser complain of nothing but the service that was killed", () => {
    expect(
      complaints.filter((text) => !/Failed to load resource|ERR_CONNECTION|WebGL|GPU|KHR_/.test(text)),
    ).toEqual([]);
  });
});

async function newPage(of: Browser = browser): Promise<Page> {
  const made = await of.newPage({ viewport: { width: 1366, height: 768 } });
  made.setDefaultTimeout(patience);
  made.on("pageerror", (error) => complaints.push(error.message));
  made.on("console", (message) => {
    if (["error", "warning"].includes(message.type())) complaints.push(message.text());
  });
  return made;
}

const blank = (label: string) => page.getByRole("textbox", { name: label, exact: true });

async function show(view: string): Promise<void> {
  await page.getByRole("radio", { name: view }).check();
}

async function solve(): Promise<void> {
  await page.getByRole("button", { name: "Solve", exact: true }).click();
  await solved();
}

async function solved(): Promise<void> {
  await page.getByText("The figures below belong to this design.").waitFor();
}

async function get<T>(path: string): Promise<T> {
  return (await (await fetch(new URL(path, served.address))).json()) as T;
}

interface Listed {
  readonly id: string;
  readonly state: string;
  readonly name: string;
}

const jobs = async (): Promise<Listed[]> => (await get<{ jobs: Listed[] }>("/v1/jobs")).jobs;

async function newestResult(): Promise<Result> {
  const done = (await jobs()).find(({ state }) => state === "done");
  return get<Result>(`/v1/jobs/${done?.id}/result`);
}

const winding = (result: Result) => result.design.coil.winding;

/** The numbers of a row of the page's first table, "R 1.6809 ± 0.0018 mΩ 13.207 ± 0.012 mΩ", in SI. */
async function shownRow(name: RegExp): Promise<number[]> {
  const cells = await page.getByRole("row", { name }).getByRole("cell").allTextContents();
  return cells.map((text) => {
    const [, number, prefix] =
      /([\d.]+)[^a-zA-ZµΩ]*(?:±\s*[\d.]+)?\s*([mµnk]?)(?:Ω|H|$)/.exec(text.replace(/\s+/g, " ")) ?? [];
    return Number(number) * { m: 1e-3, µ: 1e-6, n: 1e-9, k: 1e3, "": 1 }[prefix ?? ""]!;
  });
}

/** The page shows this result: R and L of every state, to the digits shown. */
async function expectReading({ empty, loaded }: Result): Promise<void> {
  const states = [empty, ...(loaded === null ? [] : [loaded])];
  for (const [row, key] of [
    [/^R /, "resistanceOhm"],
    [/^L /, "inductanceH"],
  ] as const) {
    await expect
      .poll(
        async () =>
          (await shownRow(row)).map((value, k) => Math.abs(value / states[k]![key].value - 1) < 1e-3),
        {
          timeout: patience,
        },
      )
      .toEqual(states.map(() => true));
  }
}

/** What axe-core finds on the page: id and place of each violation. */
async function axeFaults(on: Page = page): Promise<string[]> {
  await on.evaluate(axe.source);
  const found = (await on.evaluate("axe.run(document, { resultTypes: ['violations'] })")) as axe.AxeResults;
  return found.violations.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id}: ${target.join(" ")}`));
}

const picture = (view: string) => page.getByRole("application", { name: new RegExp(`^${view}`) });

/** Lets the picture come to rest: two shots of it that are alike. */
async function settled(): Promise<void> {
  let last = "";
  await expect
    .poll(
      async () => {
        const now = (await page.locator("canvas").first().screenshot()).toString("base64");
        const same = now === last;
        last = now;
        return same;
      },
      { timeout: patience, interval: 400 },
    )
    .toBe(true);
}

/** Pixels of the picture that bear a colour of the heat scale: their share, and how many are of its hot third and its cold end. */
async function heatPixels(view: string): Promise<{ coloured: number; hot: number; cold: number }> {
  const shot = (await picture(view).screenshot()).toString("base64");
  const palette = Array.from({ length: 65 }, (_, k) => heatColour(k / 64));
  return page.evaluate(`(async () => {
    const image = new Image();
    image.src = "data:image/png;base64,${shot}";
    await image.decode();
    const canvas = new OffscreenCanvas(image.width, image.height);
    const context = canvas.getContext("2d");
    context.drawImage(image, 0, 0);
    const { data } = context.getImageData(0, 0, image.width, image.height);
    const palette = ${JSON.stringify(palette)}.map((c) => [1, 3, 5].map((i) => parseInt(c.slice(i, i + 2), 16)));
    let [coloured, hot, cold] = [0, 0, 0];
    for (let p = 0; p < data.length; p += 4) {
      const at = palette.findIndex((c) => Math.max(...c.map((v, i) => Math.abs(v - data[p + i]))) <= 8);
      if (at < 0) continue;
      coloured++;
      if (at > 44) hot++;
      if (at < 8) cold++;
    }
    return { coloured: coloured / (data.length / 4), hot, cold };
  })()`) as Promise<{ coloured: number; hot: number; cold: number }>;
}
