import { bounceSketch, type SketchRay } from "./bounce-sketch.geometry";

const CIRCUIT = { source: 17, line: 50, crossings: 9 };

const WIDTH = 620;
const HEIGHT = 520;
const TOP = 64;
/** Height of one line delay. */
const DELAY = 46;
const LEFT = 48;
const RIGHT = 300;
/** Where the far end's voltage is drawn: 0 at its left, 1.6 of the swing at its right. */
const PLOT_LEFT = 356;
const PLOT_RIGHT = 590;
const FULL_SCALE = 1.6;
/** Above this part of the swing the receiver's limit is broken. */
const LIMIT = 1.2;

const time = (delays: number) => TOP + delays * DELAY;
const place = (end: 0 | 1) => (end === 0 ? LEFT : RIGHT);
const volts = (voltage: number) => PLOT_LEFT + (voltage / FULL_SCALE) * (PLOT_RIGHT - PLOT_LEFT);
const signed = (amplitude: number) => `${amplitude < 0 ? "−" : "+"}${Math.abs(amplitude).toFixed(2)}`;

/** One step, sent into an open line by a driver that is too strong for it: what bounces, and what the end sees. */
export function BounceSketch() {
  const { rays, farEnd } = bounceSketch(CIRCUIT);
  const bottom = time(CIRCUIT.crossings + 0.4);
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      role="img"
      aria-labelledby="sketch-title sketch-text"
      className="h-auto w-full text-[12px] max-sm:text-[17px]"
    >
      <title id="sketch-title">Bounce diagram of a 17 Ω driver on an open 50 Ω line</title>
      <desc id="sketch-text">
        The driver sends 0.75 of the swing. The open end doubles it to 1.49, far above the limit of 1.20; the
        wave returns, turns over at the driver, and the end swings to 0.76, 1.12 and onward until it settles
        at 1.
      </desc>

      <g className="fill-ink-soft" textAnchor="middle">
        <text x={LEFT} y={22}>
          driver
        </text>
        <text x={LEFT} y={38} className="fill-ink">
          17 Ω
        </text>
        <text x={(LEFT + RIGHT) / 2} y={38} className="fill-ink">
          50 Ω line
        </text>
        <text x={RIGHT} y={22}>
          receiver
        </text>
        <text x={RIGHT} y={38} className="fill-ink">
          open
        </text>
        <text x={(PLOT_LEFT + PLOT_RIGHT) / 2} y={22}>
          voltage at the receiver<tspan className="max-sm:hidden">, in parts of the swing</tspan>
        </text>
      </g>

      <g className="stroke-rule-line">
        {Array.from({ length: CIRCUIT.crossings + 1 }, (_, delay) => (
          <line
            key={delay}
            x1={LEFT}
            x2={PLOT_RIGHT}
            y1={time(delay)}
            y2={time(delay)}
            strokeDasharray="1 4"
          />
        ))}
        {[0, 1].map((voltage) => (
          <line key={voltage} x1={volts(voltage)} x2={volts(voltage)} y1={TOP} y2={bottom} />
        ))}
      </g>
      <g className="fill-ink-soft" textAnchor="end">
        {[0, 2, 4, 6, 8].map((delay) => (
          <text key={delay} x={LEFT - 10} y={time(delay) + 4}>
            {delay}
          </text>
        ))}
      </g>
      <text
        className="fill-ink-soft"
        textAnchor="middle"
        transform={`translate(12 ${time(CIRCUIT.crossings / 2)}) rotate(-90)`}
      >
        time, in line delays
      </text>

      {[LEFT, RIGHT].map((x) => (
        <line key={x} x1={x} x2={x} y1={TOP} y2={bottom} className="stroke-ink" strokeWidth={1} />
      ))}
      {rays.map((ray) => (
        <Ray key={ray.start} ray={ray} />
      ))}

      <line
        x1={volts(LIMIT)}
        x2={volts(LIMIT)}
        y1={TOP}
        y2={bottom}
        className="stroke-fail"
        strokeDasharray="6 3"
      />
      {farEnd.map((step, index) => {
        const until = farEnd[index + 1]?.at ?? CIRCUIT.crossings + 0.4;
        return step.voltage > LIMIT ? (
          <rect
            key={step.at}
            x={volts(LIMIT)}
            width={volts(step.voltage) - volts(LIMIT)}
            y={time(step.at)}
            height={(until - step.at) * DELAY}
            className="fill-fail/20"
          />
        ) : null;
      })}
      <path d={stairs(farEnd)} fill="none" className="stroke-ink" strokeWidth={2} strokeLinejoin="round" />
      <g textAnchor="middle" className="fill-ink-soft">
        <text x={volts(0)} y={TOP - 10}>
          0
        </text>
        <text x={volts(1)} y={TOP - 10}>
          1
        </text>
        <text x={volts(LIMIT)} y={TOP - 10} className="fill-fail">
          limit
        </text>
      </g>
      {farEnd.slice(1, 4).map((step) => (
        <text
          key={step.at}
          x={volts(step.voltage) + (step.voltage > LIMIT ? 8 : -8)}
          y={time(step.at + 1) + 4}
          textAnchor={step.voltage > LIMIT ? "start" : "end"}
          className="fill-ink"
        >
          {step.voltage.toFixed(2)}
        </text>
      ))}
    </svg>
  );
}

/** A crossing: outward in solid copper, returning in dashed violet, fainter as it is smaller. */
function Ray({ ray }: { ray: SketchRay }) {
  const outward = ray.to === 1;
  const [x1, x2] = [place(ray.from), place(ray.to)];
  const [y1, y2] = [time(ray.start), time(ray.start + 1)];
  const angle = (Math.atan2(y2 - y1, x2 - x1) * 180) / Math.PI;
  const labelled = Math.abs(ray.amplitude) > 0.08;
  return (
    <g>
      <line
        x1={x1}
        y1={y1}
        x2={x2}
        y2={y2}
        className={outward ? "stroke-copper" : "stroke-violet"}
        strokeWidth={1.5}
        strokeDasharray={outward ? undefined : "7 4"}
        opacity={0.25 + 0.75 * Math.min(1, Math.abs(ray.amplitude) / 0.75)}
      />
      {labelled ? (
        <text
          transform={`translate(${(x1 + x2) / 2} ${(y1 + y2) / 2}) rotate(${outward ? angle : angle - 180})`}
          y={-5}
          textAnchor="middle"
          className={outward ? "fill-copper" : "fill-violet"}
        >
          {signed(ray.amplitude)}
        </text>
      ) : null}
    </g>
  );
}

function stairs(steps: readonly { at: number; voltage: number }[]): string {
  const end = time(CIRCUIT.crossings + 0.4);
  const moves = steps.map((step, index) =>
    index === 0 ? `M${volts(step.voltage)} ${time(step.at)}` : `V${time(step.at)}H${volts(step.voltage)}`,
  );
  return `${moves.join("")}V${end}`;
}
