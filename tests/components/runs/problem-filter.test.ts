import { describe, expect, it } from "vitest";
import { filterProblems, isExcused, joinReview, NO_FILTER } from "@/components/runs/problem-filter";
import { groupProblems } from "@/components/runs/problem-groups";
import { severityOrder } from "@/components/runs/problem-columns";
import { measure, measureText, shareText } from "@/components/runs/measure";
import { aProblem } from "../../support/problems";

const waiver = (pathId: string, state: "active" | "void" | "revoked", createdAt = 1) => ({
  id: `${pathId} ${state}`,
  pathLineageId: pathId,
  mechanism: "driver mismatch",
  createdAt,
  judged: { state, covers: state === "active", reason: "" },
});
const flag = (pathId: string, mechanism: string | null, state: "open" | "resolved" = "open") => ({
  id: `flag of ${pathId}`,
  version: 1,
  state,
  subjectKind: "problem",
  subjectLineageId: pathId,
  mechanism,
  assigneeUserId: "me",
  assigneeName: "Me",
});

describe("joining what a run found with what people said", () => {
  it("gives a problem its own open flag or that of its whole path, and no resolved one", () => {
    const rows = joinReview(
      [aProblem("a"), aProblem("b"), aProblem("c")],
      [flag("a", "driver mismatch"), flag("b", null), flag("c", "driver mismatch", "resolved")],
      [],
      [],
    );
    expect(rows.map((row) => row.flag?.id ?? null)).toEqual(["flag of a", "flag of b", null]);
  });
  it("lets a waiver that covers speak before a newer one that does not, and a revoked one not at all", () => {
    const rows = joinReview(
      [aProblem("a"), aProblem("b")],
      [],
      [waiver("a", "active", 1), waiver("a", "void", 2), waiver("b", "revoked")],
      [],
    );
    expect(rows.map((row) => row.waiver?.state ?? null)).toEqual(["active", null]);
    expect(rows.map(isExcused)).toEqual([true, false]);
  });
  it("excuses no data whose missing input was accepted", () => {
    const [row] = joinReview(
      [aProblem("a", { verdict: "no data", missing: "edge time of U7" })],
      [],
      [],
      [{ missing: "edge time of U7", reason: "Not populated." }],
    );
    expect(row?.accepted).toBe("Not populated.");
  });
});

describe("filters", () => {
  const rows = joinReview(
    [
      aProblem("a", { path: "SD_CLK", rules: "overshoot,ringback" }),
      aProblem("b", { path: "SD_D1", verdict: "near", className: null, failsAtNominal: false }),
      aProblem("c", { path: "RESET", verdict: "no data", missing: "edge time of U7" }),
    ],
    [flag("b", "driver mismatch")],
    [],
    [],
  );
  const left = (over: Partial<typeof NO_FILTER>) =>
    filterProblems(rows, { ...NO_FILTER, ...over }, "me").map((row) => row.pathId);
  it("leave everything where none is set, in its order", () => expect(left({})).toEqual(["a", "b", "c"]));
  it("find every word of the search, in any of the columns", () => {
    expect(left({ text: "sd" })).toEqual(["a", "b"]);
    expect(left({ text: "sd clk" })).toEqual(["a"]);
    expect(left({ text: "u7" })).toEqual(["c"]);
  });
  it("hold a rule against each finding of a problem, not against its worst alone", () =>
    expect(left({ rule: "ringback" })).toEqual(["a"]));
  it("narrow by class, flag, person, place of failure and missing input", () => {
    expect(left({ className: "no class" })).toEqual(["b"]);
    expect(left({ flagged: "yes" })).toEqual(["b"]);
    expect(left({ mine: true })).toEqual(["b"]);
    expect(left({ nominal: "corner" })).toEqual(["b"]);
    expect(left({ missing: "edge time of U7" })).toEqual(["c"]);
    expect(left({ waived: "yes" })).toEqual([]);
  });
});

describe("groups", () => {
  const rows = joinReview(
    [
      aProblem("a", { share: -0.1 }),
      aProblem("b", { share: -5 }),
      aProblem("c", { share: -0.3 }),
      aProblem("d", {
        mechanism: "missing input",
        verdict: "no data",
        share: null,
        missing: "edge time of U7",
      }),
    ],
    [],
    [],
    [],
  );
  it("name the worst member and the one in the middle; margins are told to -200 % at most", () => {
    const [first, second] = groupProblems(rows, "mechanism");
    expect(first).toMatchObject({ title: "Driver does not match the line", count: 3, fail: 3 });
    expect(first?.worst?.pathId).toBe("b");
    expect(first?.typical?.pathId).toBe("c");
    expect(first?.margins).toEqual([-200, -30, -10]);
    expect(second).toMatchObject({ title: "Input missing", noData: 1, worst: null, typical: null });
  });
  it("by missing input hold only what lacks one", () => {
    expect(groupProblems(rows, "missing input").map((group) => [group.key, group.count])).toEqual([
      ["edge time of U7", 1],
    ]);
  });
  it("are none where nothing is grouped", () => expect(groupProblems(rows, "none")).toEqual([]));
});

describe("order and numbers", () => {
  it("worst first: failures by share of the limit, then near, then no data", () => {
    const rows = joinReview(
      [
        aProblem("near", { verdict: "near", share: 0.01 }),
        aProblem("none", { verdict: "no data", share: null }),
        aProblem("bad", { share: -0.2 }),
        aProblem("worse", { share: -3 }),
      ],
      [],
      [],
      [],
    );
    expect([...rows].sort((a, b) => severityOrder(a) - severityOrder(b)).map((row) => row.pathId)).toEqual([
      "worse",
      "bad",
      "near",
      "none",
    ]);
  });
  it("each number has its unit and a true minus, and none is NaN", () => {
    expect(measure(-0.1234, "V", { signed: true })).toEqual({ text: "−0.123", unit: "V" });
    expect(measureText(0.1667, "1")).toBe("0.17\u2009×");
    expect(measure(Number.NaN, "V")).toBeNull();
    expect(measureText(null, "V")).toBe("no value");
    expect(shareText(-0.5)).toBe("−50\u2009%");
  });
});
