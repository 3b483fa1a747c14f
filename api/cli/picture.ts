/**
 * The heat picture: a cut through coil and parts along the axis, to scale, coloured by power density, as one SVG text.
 * The solved half stands on the right; the left is its mirror image. Pure: shapes and words in, text out.
 */
import type { HeatMap, Outline } from "../../meshes/heatmap.ts";
import { heatColour } from "../format/colour.ts";
import { homelyUnit, plain } from "../format/figures.ts";
import { powerPerLength } from "../format/heat-profile.ts";
import { type HeatScale, marks, position, roundStep, scaleFor } from "../format/heat-scale.ts";
import { wrap } from "./layout.ts";
import { joinCells } from "./patches-of-colour.ts";

/** The words of a picture. */
export interface Caption {
  readonly title: string;
  /** Lines under the title: the coil, the drive, the key figures. */
  readonly lines: readonly string[];
  /** The thinnest skin depth among the parts, m; null when none conducts. */
  readonly skinDepth: number | null;
}

const paper = "#fbfaf6";
const ink = "#26221c";
const faint = "#8a8378";
/** Bodies that take no heat. */
const cold = "#dcd8ce";
/** Width of the picture and the box the drawing fits in, px. */
const page = {
  width: 1080,
  left: 84,
  boxWidth: 640,
  boxHeight: 620,
  top: 64,
  lineHeight: 21,
  titleHeight: 28,
  titleChars: 70,
  lineChars: 120,
};
/** Drawing steps a pixel: positions are whole steps. */
const fine = 10;
/** Height of the colour bar, px. */
const legendLength = 288;
/** Length of the longest bar of a profile, px, and the room a profile takes below a flat drawing. */
const profileLength = 110;
const flatRoom = 190;
/** Colours that are told apart. */
const shades = 48;

/** From metres to drawing steps, and the drawing's extent in px. */
interface Frame {
  /** px a metre. */
  readonly scale: number;
  readonly rMax: number;
  readonly zMin: number;
  readonly zMax: number;
}

function frameOf(outlines: readonly Outline[]): Frame {
  let [rMax, zMin, zMax] = [1e-6, Infinity, -Infinity];
  for (const { points } of outlines) {
    for (const [r, z] of points) {
      rMax = Math.max(rMax, r);
      zMin = Math.min(zMin, z);
      zMax = Math.max(zMax, z);
    }
  }
  if (zMin > zMax) [zMin, zMax] = [-rMax, rMax];
  const margin = 0.06 * Math.max(rMax, zMax - zMin);
  rMax += margin;
  zMin -= margin;
  zMax += margin;
  return { scale: Math.min(page.boxWidth / (2 * rMax), page.boxHeight / (zMax - zMin)), rMax, zMin, zMax };
}

/** The whole picture. */
export function renderPicture(heat: HeatMap, caption: Caption): string {
  const frame = frameOf(heat.outlines);
  const scale = scaleFor(heat);
  const titles = broken(caption.title, page.titleChars);
  const lines = caption.lines.flatMap((line) => broken(line, page.lineChars));
  const head = page.top + page.titleHeight * (titles.length - 1);
  const top = head + page.lineHeight * lines.length + 38;
  const height = (frame.zMax - frame.zMin) * frame.scale;
  const notes = notesFor(scale, caption, frame);
  const foot = top + Math.max(height + (isFlat(frame) ? flatRoom + 34 : 78), legendLength + 40);
  const total = Math.round(foot + 18 * notes.length);
  const axisX = page.left + page.boxWidth / 2;
  const middle = top + height / 2 + ((frame.zMax + frame.zMin) / 2) * frame.scale;
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${page.width} ${total}" width="${page.width}" height="${total}" role="img" font-family="system-ui, 'DejaVu Sans', sans-serif" font-size="14" fill="${ink}">`,
    `<title>${xml(caption.title)}: where the heat sits</title>`,
    `<defs><pattern id="guide" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45) scale(${fine})"><rect width="6" height="6" fill="#e4e0d6"/><path d="M0 0v6" stroke="${faint}" stroke-width="1.6"/></pattern></defs>`,
    `<rect width="100%" height="100%" fill="${paper}"/>`,
    ...titles.map((line, k) =>
      label(40, 44 + page.titleHeight * k, line, 'font-size="22" font-weight="600"'),
    ),
    ...lines.map((line, k) => label(40, head + 8 + page.lineHeight * k, line)),
    `<g transform="translate(${num(axisX)} ${num(middle)})">`,
    `<g id="half">${bodies(heat, frame)}${colours(heat, scale, frame)}${edges(heat.outlines, frame)}</g>`,
    `<use href="#half" transform="scale(-1 1)"/>`,
    axes(frame, height, middle - top),
    profile(heat, frame),
    "</g>",
    scale === null ? "" : legend(scale, top),
    ...notes.map((note, k) => label(40, foot + 18 * k, note, `fill="${faint}" font-size="13"`)),
    "</svg>",
  ]
    .filter((line) => line !== "")
    .join("\n")
    .concat("\n");
}

/** A text in lines that fit the page; a word longer than a line is cut. */
function broken(text: string, width: number): string[] {
  return wrap(text.replace(new RegExp(`\\S{${width}}`, "gu"), "$& "), "", "", width);
}

function notesFor(scale: HeatScale | null, { skinDepth }: Caption, { scale: px }: Frame): string[] {
  const cut =
    "A cut along the axis, to scale; the left half mirrors the right. Copper and parts are coloured, guides hatched.";
  if (scale === null) return [cut, "Nothing here takes heat."];
  const how =
    scale.kind === "log"
      ? "Colours are logarithmic: the darkest stands for a thousandth of the brightest, and for anything below."
      : "Colours are linear from zero.";
  const thin =
    skinDepth !== null && skinDepth * px < 1.5
      ? [`The heated skin, ${plain(skinDepth * 1e3, 2)} mm deep, is thinner than a line at this scale.`]
      : [];
  return [cut, how, ...thin];
}

function xml(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;")
    .replace(/[\p{Cc}\p{Cs}\u{FFFE}\u{FFFF}]/gu, " ");
}

function num(x: number): string {
  return String(Number(x.toFixed(1)));
}

function label(x: number, y: number, text: string, attributes = ""): string {
  return `<text x="${num(x)}" y="${num(y)}"${attributes === "" ? "" : ` ${attributes}`}>${xml(text)}</text>`;
}

/** A point in whole drawing steps, y downwards. */
function step(r: number, z: number, frame: Frame): [number, number] {
  const by = frame.scale * fine;
  return [Math.round(r * by), -Math.round(z * by)];
}

const shrink = `transform="scale(${1 / fine})"`;

function closedPath(points: Outline["points"], frame: Frame): string {
  const steps = points.map(([r, z]) => step(r, z, frame).join(" "));
  return `M${steps.join("L")}z`;
}

/** What stands behind the colours (bores left open): guides hatched, what takes no heat grey, the rest as the coldest colour. */
function bodies({ outlines, density, outline }: HeatMap, frame: Frame): string {
  const warm = new Set<number>();
  density.forEach((value, cell) => {
    if (value > 0) warm.add(outline[cell]!);
  });
  const byBody = new Map<string, { role: Outline["role"]; data: string; warm: boolean }>();
  outlines.forEach(({ role, name, points }, k) => {
    const key = `${role} ${name}`;
    const before = byBody.get(key);
    byBody.set(key, {
      role,
      data: (before?.data ?? "") + closedPath(points, frame),
      warm: (before?.warm ?? false) || warm.has(k),
    });
  });
  const paths = [...byBody.values()].map((body) => {
    const fill = body.role === "guide" ? "url(#guide)" : body.warm ? heatColour(0) : cold;
    return `<path d="${body.data}" fill="${fill}"/>`;
  });
  return `<g ${shrink} fill-rule="evenodd">${paths.join("")}</g>`;
}

/** Cells by colour, neighbours of one colour joined; a hairline of the same colour closes the seams between colours. */
function colours(
  { corners, density, outline, outlines }: HeatMap,
  scale: HeatScale | null,
  frame: Frame,
): string {
  if (scale === null) return "";
  const byShade: [number, number][][][] = Array.from({ length: shades }, () => []);
  density.forEach((value, cell) => {
    if (value <= 0 || outlines[outline[cell]!]!.role === "guide") return;
    const shade = Math.min(shades - 1, Math.floor(shades * position(scale, value)));
    const at = 8 * cell;
    byShade[shade]!.push([0, 2, 4, 6].map((k) => step(corners[at + k]!, corners[at + k + 1]!, frame)));
  });
  const paths = byShade.map((cells, shade) => {
    const data = joinCells(cells);
    const colour = heatColour((shade + 0.5) / shades);
    return data === "" ? "" : `<path d="${data}" fill="${colour}" stroke="${colour}"/>`;
  });
  return `<g ${shrink} stroke-width="${0.5 * fine}" stroke-linejoin="round">${paths.join("")}</g>`;
}

function edges(outlines: readonly Outline[], frame: Frame): string {
  const data = outlines.map(({ points }) => closedPath(points, frame)).join("");
  return `<path ${shrink} d="${data}" fill="none" stroke="${ink}" stroke-width="${0.6 * fine}"/>`;
}

/** Scales in mm below and to the left of the drawing, and the axis itself; the origin is r = 0, z = 0. */
function axes(frame: Frame, height: number, above: number): string {
  const { scale, rMax, zMin, zMax } = frame;
  const left = -page.boxWidth / 2;
  const bottom = height - above;
  const parts: string[] = [
    `<path d="M0 ${num(-above)}V${num(bottom)}" stroke="${faint}" stroke-dasharray="14 4 3 4" fill="none"/>`,
  ];
  const tick = (x: number, y: number, dx: number, dy: number, mm: number, anchor: string): string =>
    `<path d="M${num(x)} ${num(y)}l${dx} ${dy}" stroke="${faint}"/>` +
    label(
      x + 1.8 * dx,
      y + 3.2 * dy + (dy === 0 ? 4 : 3),
      plain(mm, 4),
      `text-anchor="${anchor}" font-size="12"`,
    );
  const rStep = roundStep(rMax * 1e3, Math.max(1, Math.min(5, Math.floor((rMax * scale) / 44))));
  for (let mm = 0; mm <= rMax * 1e3; mm += rStep) {
    const x = mm * 1e-3 * scale;
    parts.push(tick(x, bottom, 0, 6, mm, "middle"));
    if (mm > 0) parts.push(tick(-x, bottom, 0, 6, mm, "middle"));
  }
  const zStep = roundStep(
    (zMax - zMin) * 1e3,
    Math.max(1, Math.min(9, Math.floor(((zMax - zMin) * scale) / 24))),
  );
  for (let k = Math.ceil((zMin * 1e3) / zStep); k * zStep <= zMax * 1e3; k++) {
    parts.push(tick(left, -k * zStep * 1e-3 * scale, -6, 0, k * zStep, "end"));
  }
  const half = num(rMax * scale);
  parts.push(
    `<path d="M-${half} ${num(bottom)}H${half}M${left} ${num(-zMax * scale)}V${num(-zMin * scale)}" stroke="${faint}" fill="none"/>`,
    label(0, bottom + 42, "radius, mm", `text-anchor="middle" font-size="12" fill="${faint}"`),
    label(left, -zMax * scale - 8, "height z, mm", `text-anchor="middle" font-size="12" fill="${faint}"`),
  );
  return parts.join("\n");
}

/** Whether the drawing lies so flat that the radius tells more than the height. */
function isFlat({ scale, zMin, zMax }: Frame): boolean {
  return (zMax - zMin) * scale < 220;
}

/** The parts' power along the height, beside the drawing at the same heights; of flat designs along the radius, below it. */
function profile(heat: HeatMap, frame: Frame): string {
  const { scale, rMax, zMin, zMax } = frame;
  const flat = isFlat(frame);
  const [along, from, to] = flat ? (["r", 0, rMax] as const) : (["z", zMin, zMax] as const);
  const count = Math.max(8, Math.round(((to - from) * scale) / 3));
  const power = powerPerLength(heat, { along, from, to, count });
  const largest = Math.max(...power);
  if (largest === 0) return "";
  const ends = Array.from({ length: count + 1 }, (_, k) => (from + (k / count) * (to - from)) * scale);
  const lengths = Array.from(power, (value) => (profileLength * value) / largest);
  const perLength = homelyUnit({ factor: 1e2, symbol: "W/cm" }, [largest]);
  const words = [
    `parts' heat per ${flat ? "radius" : "height"}`,
    `at most ${plain(largest / perLength.factor, 3)} ${perLength.symbol}`,
  ] as const;
  return flat ? belowDrawing(ends, lengths, words, -zMin * scale) : besideDrawing(ends, lengths, words);
}

type Words = readonly [string, string];
const profileFill = `fill="${heatColour(0.62)}" fill-opacity="0.75"`;

/** Bars to the right of a line; `ends` are heights above z = 0, px. */
function besideDrawing(ends: readonly number[], lengths: readonly number[], words: Words): string {
  const x = page.boxWidth / 2 + 26;
  const steps = lengths.map((length, k) => `H${num(x + length)}V${num(-ends[k + 1]!)}`).join("");
  const top = -ends.at(-1)!;
  return [
    `<path d="M${x} ${num(-ends[0]!)}${steps}H${x}z" ${profileFill}/>`,
    `<path d="M${x} ${num(-ends[0]!)}V${num(top)}" stroke="${faint}"/>`,
    label(x, top - 24, words[0], 'font-size="12"'),
    label(x, top - 8, words[1], `font-size="12" fill="${faint}"`),
  ].join("\n");
}

/** Bars standing on a line under the radius scale, on both sides of the axis; `ends` are radii, px. */
function belowDrawing(
  ends: readonly number[],
  lengths: readonly number[],
  words: Words,
  bottom: number,
): string {
  const y = bottom + flatRoom - 8;
  const side = (sign: 1 | -1): string => {
    const steps = lengths.map((length, k) => `V${num(y - length)}H${num(sign * ends[k + 1]!)}`).join("");
    return `<path d="M0 ${num(y)}${steps}V${num(y)}z" ${profileFill}/>`;
  };
  const half = num(ends.at(-1)!);
  const x = page.boxWidth / 2 + 26;
  return [
    side(1),
    side(-1),
    `<path d="M-${half} ${num(y)}H${half}" stroke="${faint}"/>`,
    label(x, y - 16, words[0], 'font-size="12"'),
    label(x, y, words[1], `font-size="12" fill="${faint}"`),
  ].join("\n");
}

/** The colour bar at the right, in W/cm³. */
function legend(scale: HeatScale, top: number): string {
  const x = page.left + page.boxWidth + 176;
  const first = top;
  const slice = legendLength / shades;
  const unit = homelyUnit({ factor: 1e6, symbol: "W/cm³" }, [scale.high]);
  const bars = Array.from({ length: shades }, (_, k) => {
    const y = first + legendLength - (k + 1) * slice;
    return `<rect x="${x}" y="${num(y)}" width="22" height="${num(k === 0 ? slice : slice + 1)}" fill="${heatColour((k + 0.5) / shades)}"/>`;
  });
  const ticks = marks(scale).map((density) => {
    const y = first + legendLength * (1 - position(scale, density));
    return (
      `<path d="M${x + 22} ${num(y)}h5" stroke="${faint}"/>` +
      label(x + 32, y + 4, plain(density / unit.factor, 3), 'font-size="12"')
    );
  });
  return [
    label(x, top - 24, `power density, ${unit.symbol}`, 'font-size="12"'),
    label(x, top - 8, scale.kind === "log" ? "logarithmic" : "linear", `font-size="12" fill="${faint}"`),
    ...bars,
    ...ticks,
  ].join("\n");
}
