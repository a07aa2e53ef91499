import { Group } from "@visx/group";
import type { Mark, TextMark } from "@/lib/drawings/marks";
import type { Hatch, Ink } from "@/lib/drawings/palette";
import { HATCH_LINES, HATCHES } from "@/lib/drawings/palette";
import { isHatch } from "@/lib/drawings/svg-string";

/** Draws marks in the page's theme. `scope` keeps the ids of patterns and clips apart from other drawings'. */
export function Marks({ marks, scope }: { marks: readonly Mark[]; scope: string }) {
  return marks.map((mark, i) => (
    <OneMark key={i} mark={mark} scope={`${scope}-${i}`} patterns={scope.split("-")[0] ?? scope} />
  ));
}

function OneMark({ mark, scope, patterns }: { mark: Mark; scope: string; patterns: string }) {
  switch (mark.kind) {
    case "group":
      return (
        <Group
          opacity={mark.opacity}
          clipPath={mark.clip ? `url(#${scope}-clip)` : undefined}
          data-hit={mark.hit}
        >
          {mark.tip ? <title>{mark.tip}</title> : null}
          {mark.clip ? (
            <clipPath id={`${scope}-clip`}>
              <rect {...mark.clip} />
            </clipPath>
          ) : null}
          {mark.marks.map((inner, i) => (
            <OneMark key={i} mark={inner} scope={`${scope}-${i}`} patterns={patterns} />
          ))}
        </Group>
      );
    case "text":
      return <TextOf mark={mark} />;
    case "line":
      return (
        <line x1={px(mark.x1)} y1={px(mark.y1)} x2={px(mark.x2)} y2={px(mark.y2)} {...strokeOf(mark)}>
          {mark.tip ? <title>{mark.tip}</title> : null}
        </line>
      );
    case "path":
      return (
        <path d={mark.d} {...fillOf(mark, patterns)}>
          {mark.tip ? <title>{mark.tip}</title> : null}
        </path>
      );
    case "rect":
      return (
        <rect
          x={px(mark.x)}
          y={px(mark.y)}
          width={px(mark.width)}
          height={px(mark.height)}
          rx={mark.radius}
          {...fillOf(mark, patterns)}
        >
          {mark.tip ? <title>{mark.tip}</title> : null}
        </rect>
      );
    case "circle":
      return (
        <circle cx={px(mark.cx)} cy={px(mark.cy)} r={mark.r} {...fillOf(mark, patterns)}>
          {mark.tip ? <title>{mark.tip}</title> : null}
        </circle>
      );
  }
}

function TextOf({ mark }: { mark: TextMark }) {
  return (
    <text
      x={px(mark.x)}
      y={px(mark.y)}
      fontSize={mark.size}
      fontWeight={mark.weight}
      textAnchor={mark.anchor}
      fill={colour(mark.ink)}
      opacity={mark.opacity}
      className={mark.mono ? "font-mono" : undefined}
      transform={mark.rotate ? `rotate(${px(mark.rotate)} ${px(mark.x)} ${px(mark.y)})` : undefined}
      {...(mark.halo
        ? {
            stroke: "var(--drawing-ground, var(--sheet))",
            strokeWidth: 4,
            strokeLinejoin: "round" as const,
            paintOrder: "stroke",
          }
        : {})}
    >
      {mark.tip ? <title>{mark.tip}</title> : null}
      {mark.spans.map((span, i) =>
        span.ink || span.weight ? (
          <tspan key={i} fill={span.ink && colour(span.ink)} fontWeight={span.weight}>
            {span.text}
          </tspan>
        ) : (
          span.text
        ),
      )}
    </text>
  );
}

/** The hatches of a drawing, in the page's colours. */
export function Hatches({ scope }: { scope: string }) {
  return HATCHES.map((name) => {
    const { ink, spacing, angle, weight, opacity } = HATCH_LINES[name];
    return (
      <pattern
        key={name}
        id={`${scope}-${name}`}
        width={spacing}
        height={spacing}
        patternUnits="userSpaceOnUse"
        patternTransform={`rotate(${angle})`}
      >
        <line
          x1={0}
          y1={0}
          x2={0}
          y2={spacing}
          stroke={colour(ink)}
          strokeWidth={weight * 2}
          strokeOpacity={opacity}
        />
      </pattern>
    );
  });
}

function colour(ink: Ink): string {
  return `var(--${ink})`;
}

interface StrokeStyle {
  stroke?: Ink;
  weight?: number;
  dash?: string;
  opacity?: number;
  hit?: string;
}

function strokeOf(mark: StrokeStyle) {
  return {
    stroke: mark.stroke && colour(mark.stroke),
    strokeWidth: mark.stroke && (mark.weight ?? 1),
    strokeDasharray: mark.dash,
    opacity: mark.opacity,
    "data-hit": mark.hit,
  };
}

function fillOf(mark: StrokeStyle & { fill?: Ink | Hatch; fillOpacity?: number }, patterns: string) {
  const { fill } = mark;
  return {
    fill: fill === undefined ? "none" : isHatch(fill) ? `url(#${patterns}-${fill})` : colour(fill),
    fillOpacity: mark.fillOpacity,
    strokeLinejoin: mark.stroke && ("round" as const),
    ...strokeOf(mark),
  };
}

function px(value: number): number {
  return Math.round(value * 100) / 100;
}
