import * as f from "../formulas";
import type { Structure } from "./classify";
import { coupledResult, differentialResult, singleResult, type Candidate } from "./closed-form-result";

/** Closed forms of traces with air above; the one in use first. */

export function outerSingle(s: Structure): Candidate[] {
  const { width: w, thickness: t } = s;
  const { height: h, er } = s.below;
  const thin: Candidate = () =>
    singleResult(f.hammerstadJensenZeroThicknessNote, s, f.hammerstadJensenZeroThickness(w, h, er), {
      knowsThickness: false,
    });
  return [
    ...(t > 0
      ? [
          () => singleResult(f.hammerstadJensenThicknessNote, s, f.hammerstadJensenThickness(w, h, t, er)),
          thin,
        ]
      : [thin]),
    () => singleResult(f.wheeler1977Note, s, f.wheeler1977(w, h, t, er)),
    () => singleResult(f.wheeler1965Note, s, f.wheeler1965(w, h, er), { knowsThickness: false }),
    () => singleResult(f.tradeMicrostripNote, s, f.tradeMicrostrip(w, h, t, er)),
  ];
}

export function coveredSingle(s: Structure): Candidate[] {
  const { width: w, thickness: t } = s;
  const { height: h, er } = s.below;
  const cover = s.above ?? { height: 0, er: 1 };
  return [
    () => singleResult(f.coveredMicrostripNote, s, f.coveredMicrostrip(w, h, t, cover.height, er, cover.er)),
    () => {
      const trade = f.tradeEmbeddedMicrostrip(w, h, h + cover.height, t, er);
      const ignores = cover.er === er ? [] : ["the cover's own Dk"];
      return [
        singleResult(f.tradeEmbeddedNote, s, trade.form60, { variant: "60", ignores }),
        singleResult(f.tradeEmbeddedNote, s, trade.form87, { variant: "87", ignores }),
      ];
    },
    () =>
      singleResult(f.hammerstadJensenThicknessNote, s, f.hammerstadJensenThickness(w, h, t, er), {
        ignores: ["the cover"],
      }),
  ];
}

export function outerPair(s: Structure, gap: number): Candidate[] {
  const { width: w, thickness: t } = s;
  const { height: h, er } = s.below;
  const thin: Candidate = () =>
    coupledResult(f.kirschningJansenNote, s, f.kirschningJansen(w, gap, h, er), { knowsThickness: false });
  return [
    ...(t > 0
      ? [
          () =>
            coupledResult(f.kirschningJansenThicknessNote, s, f.kirschningJansenThickness(w, gap, h, t, er)),
          thin,
        ]
      : [thin]),
    () => {
      const single = f.tradeMicrostrip(w, h, t, er);
      const differential = 2 * single.impedance * f.tradeMicrostripPairFactor(gap, h);
      return differentialResult(f.tradeDifferentialMicrostripNote, s, differential, single.inRange);
    },
  ];
}

export function coveredPair(s: Structure, gap: number): Candidate[] {
  const cover = s.above ?? { height: 0, er: 1 };
  return [
    () => {
      const pair = f.coveredPair(
        s.width,
        gap,
        s.below.height,
        s.thickness,
        cover.height,
        s.below.er,
        cover.er,
      );
      return coupledResult(f.coveredPairNote, s, pair);
    },
  ];
}

export function coplanar(s: Structure, slot: number): Candidate[] {
  return [
    () =>
      singleResult(
        f.coplanarNote,
        s,
        f.coplanarWithPlane(s.width, meanSlot(s, slot), s.below.height, s.below.er),
        {
          knowsThickness: false,
        },
      ),
  ];
}

/** The slot is told at the bottom faces; the mean width goes with the mean slot, wider by half of what the crown lost. */
function meanSlot(s: Structure, slot: number): number {
  return slot + s.slope;
}
