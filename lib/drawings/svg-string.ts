import type { Drawing, GroupMark, Mark, TextMark } from "./marks";
import { px } from "./marks";
import { HATCH_LINES, HATCHES, type Hatch, type Ink, LIGHT } from "./palette";

const FACE = "'Instrument Sans Variable','Instrument Sans',system-ui,sans-serif";
const MONO = "'JetBrains Mono Variable','JetBrains Mono',ui-monospace,monospace";

/**
 * A drawing as one standalone SVG document in the colours of light paper. The same drawing gives the same
 * bytes on every machine.
 *
 * @param drawing what a geometry function returned
 * @returns an SVG 1.1 document, UTF-8
 */
export function svgString(drawing: Drawing): string {
  const clips: string[] = [];
  const body = drawing.marks.map((mark) => markString(mark, clips)).join("\n");
  const [w, h] = [px(drawing.width), px(drawing.height)];
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${w}" height="${h}" viewBox="0 0 ${w} ${h}" role="img" aria-labelledby="title desc" font-family="${FACE}" style="font-variant-numeric:tabular-nums">`,
    `<title id="title">${escaped(drawing.title)}</title>`,
    `<desc id="desc">${escaped(drawing.description)}</desc>`,
    `<defs>${HATCHES.map(patternString).join("")}${clips.join("")}</defs>`,
    `<rect width="${w}" height="${h}" fill="${LIGHT.sheet}"/>`,
    body,
    "</svg>\n",
  ].join("\n");
}

function markString(mark: Mark, clips: string[]): string {
  switch (mark.kind) {
    case "group":
      return groupString(mark, clips);
    case "text":
      return textString(mark);
    case "line":
      return element(
        "line",
        { x1: mark.x1, y1: mark.y1, x2: mark.x2, y2: mark.y2, ...strokes(mark) },
        mark.tip,
      );
    case "path":
      return element("path", { d: mark.d, ...fills(mark) }, mark.tip);
    case "rect":
      return element(
        "rect",
        { x: mark.x, y: mark.y, width: mark.width, height: mark.height, rx: mark.radius, ...fills(mark) },
        mark.tip,
      );
    case "circle":
      return element("circle", { cx: mark.cx, cy: mark.cy, r: mark.r, ...fills(mark) }, mark.tip);
  }
}

function groupString(mark: GroupMark, clips: string[]): string {
  let clip: string | undefined;
  if (mark.clip) {
    clip = `clip-${clips.length}`;
    const { x, y, width, height } = mark.clip;
    clips.push(`<clipPath id="${clip}">${element("rect", { x, y, width, height })}</clipPath>`);
  }
  const inner = mark.marks.map((m) => markString(m, clips)).join("\n");
  const attributes = attributeText({ "clip-path": clip && `url(#${clip})`, opacity: mark.opacity });
  return `<g${attributes}>${titled(mark.tip)}\n${inner}\n</g>`;
}

function textString(mark: TextMark): string {
  const attributes = attributeText({
    x: mark.x,
    y: mark.y,
    "font-size": mark.size,
    "font-weight": mark.weight,
    "font-family": mark.mono ? MONO : undefined,
    "text-anchor": mark.anchor === "start" ? undefined : mark.anchor,
    fill: LIGHT[mark.ink],
    opacity: mark.opacity,
    transform: mark.rotate ? `rotate(${px(mark.rotate)} ${px(mark.x)} ${px(mark.y)})` : undefined,
    ...(mark.halo
      ? { stroke: LIGHT.sheet, "stroke-width": 4, "stroke-linejoin": "round", "paint-order": "stroke" }
      : {}),
  });
  const spans = mark.spans.map((span) =>
    span.ink || span.weight
      ? `<tspan${attributeText({ fill: span.ink && LIGHT[span.ink], "font-weight": span.weight })}>${escaped(span.text)}</tspan>`
      : escaped(span.text),
  );
  return `<text${attributes}>${titled(mark.tip)}${spans.join("")}</text>`;
}

type Attributes = Record<string, string | number | undefined>;

interface StrokeStyle {
  stroke?: Ink;
  weight?: number;
  dash?: string;
  opacity?: number;
}

function strokes(mark: StrokeStyle): Attributes {
  return {
    stroke: mark.stroke && LIGHT[mark.stroke],
    "stroke-width": mark.stroke && (mark.weight ?? 1),
    "stroke-dasharray": mark.dash,
    opacity: mark.opacity,
  };
}

function fills(mark: StrokeStyle & { fill?: Ink | Hatch; fillOpacity?: number }): Attributes {
  const fill =
    mark.fill === undefined ? "none" : isHatch(mark.fill) ? `url(#${mark.fill})` : LIGHT[mark.fill];
  return {
    fill,
    "fill-opacity": mark.fillOpacity,
    "stroke-linejoin": mark.stroke && "round",
    ...strokes(mark),
  };
}

export function isHatch(fill: Ink | Hatch): fill is Hatch {
  return fill in HATCH_LINES;
}

function patternString(name: Hatch): string {
  const { ink, spacing, angle, weight, opacity } = HATCH_LINES[name];
  return (
    `<pattern id="${name}" width="${spacing}" height="${spacing}" patternUnits="userSpaceOnUse" patternTransform="rotate(${angle})">` +
    `<line x1="0" y1="0" x2="0" y2="${spacing}" stroke="${LIGHT[ink]}" stroke-width="${weight * 2}" stroke-opacity="${opacity}"/></pattern>`
  );
}

function element(name: string, attributes: Attributes, tip?: string): string {
  return tip
    ? `<${name}${attributeText(attributes)}>${titled(tip)}</${name}>`
    : `<${name}${attributeText(attributes)}/>`;
}

function titled(tip: string | undefined): string {
  return tip ? `<title>${escaped(tip)}</title>` : "";
}

function attributeText(attributes: Attributes): string {
  return Object.entries(attributes)
    .filter(([, value]) => value !== undefined && value !== "")
    .map(([name, value]) => ` ${name}="${escaped(String(typeof value === "number" ? px(value) : value))}"`)
    .join("");
}

function escaped(words: string): string {
  return words.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/>/g, "&gt;").replace(/"/g, "&quot;");
}
