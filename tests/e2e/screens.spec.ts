/**
 * Every page as each role that may see it, on the small and the large board: it answers, within the content
 * policy, accessible, without sideways scroll and without a number that is none; and leaves a picture to look at
 * in test-results/screens.
 */
import type { Page } from "@playwright/test";
import { type PackedRows, type ProblemEntry, unpackRows } from "@/lib/schemas/problem-list";
import { BOARDS, draftRun, type ListedNet, listNets, projectId, read } from "./boards";
import type { Role } from "./people";
import { expect, expectAccessible, expectNoSidewaysScroll, expectSensibleText, test, visit } from "./support";

test.describe.configure({ mode: "parallel" });

type Board = keyof typeof BOARDS;

interface Place {
  name: string;
  path: (board: Facts) => string;
  /** what the page is not finished without */
  shows?: (page: Page) => Promise<void>;
}

interface Facts {
  project: string;
  run: string;
  nets: ListedNet[];
  release: string | null;
  failing: string;
}

const table = (name: string | RegExp) => async (page: Page) =>
  expect(page.getByRole("table", { name })).toBeVisible();
const heading = (name: string | RegExp) => async (page: Page) =>
  expect(page.getByRole("heading", { name }).first()).toBeVisible();
const at = (place: string) => (board: Facts) => `/projects/${board.project}/${place}`;
const netAt = (board: Facts, name: string) => {
  const net = board.nets.find((entry) => entry.name === name) ?? board.nets[0];
  return `/projects/${board.project}/nets/${net?.lineageId ?? ""}`;
};
async function drawn(page: Page): Promise<void> {
  for (const name of ["Waveforms", "Bounces", "Along the line at the cursor"])
    await expect(page.getByRole("region", { name }).getByRole("img").first()).toBeVisible();
}

/** Pages that everybody of a team sees. */
const COMMON: Place[] = [
  { name: "overview", path: at("overview"), shows: heading("Verdicts") },
  { name: "stackup", path: at("stackup"), shows: table(/^Layers/) },
  { name: "impedance", path: at("impedance"), shows: table("Impedance by class and layer") },
  { name: "classes", path: at("classes"), shows: table("Classes") },
  { name: "models", path: at("classes?tab=models"), shows: table("Models") },
  { name: "bindings", path: at("classes?tab=bindings") },
  { name: "nets", path: at("nets"), shows: table("Nets") },
  { name: "parts", path: at("nets/parts") },
  { name: "rules", path: at("rules"), shows: table("Rules") },
  { name: "runs", path: at("runs"), shows: table("Runs, newest first") },
  { name: "run", path: (board) => at(`runs/${board.run}`)(board), shows: table("Problems, worst first") },
  { name: "review", path: at("review"), shows: heading("What holds up the release") },
  { name: "missing-inputs", path: at("review?tab=missing"), shows: table("Missing inputs") },
  { name: "releases", path: at("releases"), shows: heading(/^Draft/) },
  {
    name: "net",
    path: (board) => `/projects/${board.project}/nets/${board.failing}?run=${board.run}`,
    shows: drawn,
  },
];

/** Pages of which one look is enough. */
const ONCE: Place[] = [
  { name: "projects", path: () => "/projects", shows: table("Projects") },
  { name: "team", path: () => "/team", shows: table("Members") },
  { name: "materials", path: () => "/materials", shows: table("Materials") },
  { name: "create-team", path: () => "/create-team" },
  { name: "import", path: at("nets/import"), shows: heading("Import") },
  { name: "roles", path: at("nets/roles"), shows: heading("Which pins drive") },
  { name: "flags", path: at("review?tab=flags"), shows: table("Flags") },
  { name: "waivers", path: at("review?tab=waivers"), shows: table("Waivers") },
  { name: "selectors", path: (board) => at(`runs/${board.run}?view=selectors`)(board) },
  { name: "clean-net", path: (board) => netAt(board, "SD_A0"), shows: drawn },
  { name: "incomplete-net", path: (board) => netAt(board, "VALVE_EN") },
  { name: "power-net", path: (board) => netAt(board, "GND") },
  { name: "pair-net", path: (board) => netAt(board, "PROBE_P") },
  {
    name: "release",
    path: (board) => at(`releases/${board.release ?? ""}`)(board),
    shows: heading("Controlled lines"),
  },
  { name: "released-stackup", path: at("stackup?rev=A"), shows: table(/^Layers/) },
];

const LARGE: Place[] = COMMON.filter(
  ({ name }) => !["models", "bindings", "rules", "stackup"].includes(name),
);

for (const role of ["designer", "reviewer", "owner"] as const)
  for (const place of COMMON) look(role, "small", place);
for (const place of ONCE) look("designer", "small", place);
for (const place of LARGE) look("designer", "large", place);
look("reviewer", "small", { name: "audit", path: () => "/audit" });
look("owner", "small", { name: "team", path: () => "/team", shows: table("Members") });

test("manufacturer sees notes, and what a note says", async ({ as }, info) => {
  const page = await as("manufacturer");
  await inspect(page, "/fabrication");
  await keep(page, info.project.name, "manufacturer-notes");
  const { notes } = await read<{ notes: { releaseId: string }[] }>(page, "/fabrication/notes");
  await inspect(page, `/fabrication/${notes[0]?.releaseId ?? ""}`);
  await expect(page.getByRole("heading", { name: "Controlled lines" })).toBeVisible();
  await keep(page, info.project.name, "manufacturer-note");
});

test("the outbox and the demo accounts of the sign-in page", async ({ quietPage: page }, info) => {
  await inspect(page, "/dev/outbox");
  await keep(page, info.project.name, "anonymous-outbox");
  await inspect(page, "/sign-in");
  await keep(page, info.project.name, "anonymous-sign-in");
});

function look(role: Role, board: Board, place: Place): void {
  test(`${place.name} of the ${board} board as ${role}`, async ({ as }, info) => {
    const page = await as(role);
    await inspect(page, place.path(await factsOf(page, board)), place.shows);
    const name = board === "large" ? `large-${place.name}` : place.name;
    await keep(page, info.project.name, `${role}-${name}`);
  });
}

async function inspect(page: Page, path: string, shows?: Place["shows"]): Promise<void> {
  const answer = await visit(page, path);
  expect(answer?.status(), path).toBe(200);
  await shows?.(page);
  await expect(page.getByRole("heading").first()).toBeVisible();
  await expect(page.getByRole("status", { name: /^(Loading|Reading)/ })).toHaveCount(0);
  await expectSensibleText(page);
  await expectNoSidewaysScroll(page);
  await expectAccessible(page);
}

async function keep(page: Page, project: string, name: string): Promise<void> {
  const folder = project === "wide" ? "wide" : "narrow";
  await page.screenshot({ path: `test-results/screens/${folder}/${name}.png`, fullPage: true });
}

const known = new Map<Board, Facts>();

async function factsOf(page: Page, board: Board): Promise<Facts> {
  const held = known.get(board);
  if (held) return held;
  const project = await projectId(page, BOARDS[board]);
  const run = (await draftRun(page, project)).id;
  const problems = unpackRows<ProblemEntry>(
    await read<PackedRows>(page, `/projects/${project}/runs/${run}/problems`),
  );
  const failing = problems.find(({ verdict, pathId }) => verdict === "fail" && !pathId.startsWith("line "));
  const { releases } = await read<{ releases: { id: string }[] }>(page, `/projects/${project}/releases`);
  const facts = {
    project,
    run,
    nets: await listNets(page, project),
    release: releases[0]?.id ?? null,
    failing: failing?.pathId ?? "",
  };
  known.set(board, facts);
  return facts;
}
