/**
 * A board from its first sketch to the fabricator's acknowledgement, each step by the person whose job it is, in
 * the words they would use. The steps build on one another.
 */
import { createHash } from "node:crypto";
import type { Download, Locator, Page } from "@playwright/test";
import { linkFromMail } from "./mail";
import { readAccount } from "./people";
import { expect, expectAccessible, test, visit, write } from "./support";
import { unzip } from "./unzip";

test.describe.configure({ mode: "serial", timeout: 180_000 });

const board = `Sluice gate controller ${crypto.randomUUID().slice(0, 8)}`;
/** Nets: one that rings, two short ones, one of no class, a power net. */
const SECTIONS = [
  "net\tfrom\tto\tlayer\twidth_mm\tlength_mm",
  "GATE_CLK\tU1.1\tU2.1\tL1 Top\t0.2\t140",
  "GATE_D0\tU1.2\tU2.2\tL1 Top\t0.2\t9",
  "GATE_D1\tU1.3\tU2.3\tL1 Top\t0.2\t9.5",
  "GATE_D2\tU1.4\tU2.4\tL1 Top\t0.2\t12..7",
  "SPARE\tU1.5\tU2.5\tL1 Top\t0.2\t8",
  "GND\tC1.2\tU1.9\tL1 Top\t0.3\t3",
].join("\n");
const PARTS = [
  "reference\tpart number\tvalue\tpins",
  "U1\tSSC-MCU-64\tcontroller\t64",
  "U2\tLAT-8\tlatch\t20",
  "C1\tCC0402-100N\t100n\t2",
].join("\n");

let project = "";
let run = "";
let release = "";
let noteLink = "";

test("a designer starts a board from six layers and edits its stackup; drawing and total follow, undo takes it back", async ({
  as,
}) => {
  const page = await as("designer");
  await visit(page, "/projects");
  await page.getByRole("button", { name: "Create a project" }).click();
  await page.getByLabel("Name of the board").fill(board);
  await page.getByLabel("Stackup to start from").selectOption("6-layers");
  await page.getByRole("button", { name: "Create", exact: true }).click();
  await page.waitForURL("**/stackup");
  project = /projects\/([^/]+)/.exec(page.url())?.[1] ?? "";

  const total = page.locator("dl > div").filter({ hasText: "Over copper" }).locator("dd");
  const section = page.getByRole("img", { name: "Stackup cross-section" });
  await expect(total).toContainText("mm");
  const before = await total.innerText();
  const drawnBefore = await section.locator("desc").textContent();

  const core = page.getByRole("row", { name: "5, Core 2-3" });
  await write(core.getByLabel("Thickness"), "5 mil");
  await expect(total).not.toHaveText(before);
  await expect(section.locator("desc")).not.toHaveText(drawnBefore ?? "");
  await expect(page.getByRole("status").filter({ hasText: /^Saved$/ })).toBeVisible();

  await page.getByRole("button", { name: /^Undo/ }).click();
  await expect(total).toHaveText(before);
  await expect(section.locator("desc")).toHaveText(drawnBefore ?? "");
  await page.getByRole("button", { name: /^Redo/ }).click();
  await expect(total).not.toHaveText(before);
  await expectAccessible(page);
});

test("a model and two classes come from presets; the impedance page finds their width and copies the table", async ({
  as,
}) => {
  const page = await as("designer");
  await visit(page, `/projects/${project}/classes?tab=models`);
  await page.getByRole("button", { name: "New model" }).click();
  await page.getByRole("dialog").getByLabel("Name").fill("Gate pin");
  await page.getByRole("dialog").getByRole("button", { name: "Make the model" }).click();
  await expect(page.getByRole("table", { name: "Models" })).toContainText("Gate pin");

  for (const [name, patterns] of [
    ["Gate clock", "GATE_CLK"],
    ["Gate data", "GATE_D*"],
  ] as const) {
    await visit(page, `/projects/${project}/classes`);
    await page.getByRole("button", { name: "New class" }).click();
    const dialog = page.getByRole("dialog");
    await dialog.getByLabel("Start from").selectOption({ label: "LVCMOS 3.3 V" });
    await dialog.getByLabel("Name").fill(name);
    await dialog.getByRole("button", { name: "Make the class" }).click();
    const panel = page.getByRole("complementary", { name });
    await panel.getByLabel("Driver model").selectOption({ label: "Gate pin (20 Ω)" });
    await panel.getByLabel("Receiver model").selectOption({ label: "Gate pin (4 pF)" });
    await write(panel.getByLabel("Net names"), patterns);
    await panel.getByRole("checkbox", { name: "L1 Top" }).check();
    await expect(panel.getByRole("status")).toHaveText("Saved");
  }

  await visit(page, `/projects/${project}/impedance`);
  const table = page.getByRole("table", { name: "Impedance by class and layer" });
  for (const name of ["Gate clock", "Gate data"]) {
    await table.getByRole("row", { name: new RegExp(name) }).click();
    const panel = page.getByRole("complementary", { name: `${name} on L1 Top` });
    await panel.getByRole("button", { name: "Set the width that meets" }).click();
    await panel.getByRole("button", { name: "Use in class" }).click();
    await expect(panel.getByRole("button", { name: "The class has this width" })).toBeVisible();
    await expect(panel.getByText(/Hammerstad/).first()).toBeVisible();
    await page.keyboard.press("Escape");
  }
  await page.getByRole("button", { name: "Copy as table" }).click();
  await page.getByRole("menuitem", { name: /^Copy widths that meet the target/ }).click();
  await expect(page.getByText("2 rows copied, in mm")).toBeVisible();
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  expect(copied.split("\n")[0]).toMatch(/class\tlayer/i);
  expect(copied).toMatch(/Gate clock\tL1 Top\t0\.\d+/);
  await expectAccessible(page);
});

test("routed nets are pasted: the bad row is named, the good ones come in once confirmed, then roles", async ({
  as,
}) => {
  const page = await as("designer");
  await pasteList(page, SECTIONS);
  await expect(page.getByRole("heading", { name: "5 of 6 rows can be taken" })).toBeVisible();
  const bad = page.getByRole("table", { name: "Rows not taken" }).getByRole("row").nth(1);
  await expect(bad).toContainText("5");
  await expect(bad).toContainText("length");
  await expect(bad).toContainText("12..7");
  await expect(bad).toContainText("is not a length");
  const [report] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "Save the report" }).click(),
  ]);
  expect(await textOf(report)).toContain("12..7");
  await expectAccessible(page);
  await page.getByRole("button", { name: "Import 5 rows, leave out 1" }).click();
  await expect(page.getByRole("status").filter({ hasText: "Section list imported" })).toBeVisible();

  await pasteList(page, PARTS);
  await page.getByRole("button", { name: "Import 3 rows" }).click();
  await expect(page.getByRole("status").filter({ hasText: "Parts list imported" })).toBeVisible();

  await visit(page, `/projects/${project}/nets/roles`);
  await page.getByRole("checkbox", { name: /^U1/ }).check();
  await page.getByRole("checkbox", { name: "All other pins of U and J parts receive" }).check();
  await expect(page.getByRole("table", { name: "Out of scope" })).toContainText("GND");
  await expectAccessible(page);
  await page.getByRole("button", { name: "Confirm" }).click();
  await page.waitForURL(/\/nets$/);
  const nets = page.getByRole("table", { name: "Nets" });
  await expect(nets.getByRole("row", { name: /GATE_CLK/ })).toContainText("Gate clock");
  await expect(nets.getByRole("row", { name: /GATE_D0/ })).toContainText("Gate data");
});

test("the owner sets a rule; the designer runs the check to its end", async ({ as }) => {
  const owner = await as("owner");
  await visit(owner, `/projects/${project}/rules`);
  const limit = owner.getByRole("textbox", { name: /^Limit of Overshoot, relative/ });
  await write(limit, "22");
  await expect(owner.getByRole("status").filter({ hasText: /^Saved$/ })).toBeVisible();

  const designer = await as("designer");
  await visit(designer, `/projects/${project}/rules`);
  await expect(designer.getByText("Reviewers and owners set these limits.", { exact: false })).toBeVisible();
  await visit(designer, `/projects/${project}/runs`);
  await designer.getByRole("button", { name: "Run the check" }).first().click();
  await expect(designer.getByRole("progressbar")).toHaveCount(0);
  const row = designer.getByRole("table", { name: "Runs, newest first" }).getByRole("row").nth(1);
  await expect(row).toContainText("done", { timeout: 60_000 });
  await expect(row).toContainText("current");
  await row.getByRole("link").first().click();
  await designer.waitForURL(/\/runs\/[^/]+$/);
  run = /runs\/([^/?]+)/.exec(designer.url())?.[1] ?? "";
});

test("the problems are worked by keyboard, a net shows why it rings, and a change is tried on it", async ({
  as,
}) => {
  const page = await as("designer");
  await visit(page, `/projects/${project}/runs/${run}`);
  const problems = page.getByRole("table", { name: "Problems, worst first" });
  await expect(problems).toBeVisible();
  await page.keyboard.press("j");
  await expect(problems.locator("tr[aria-current=true]")).toContainText("GATE_CLK");
  await expect(page).toHaveURL(/at=/);
  await page.keyboard.press("j");
  await page.keyboard.press("k");
  await expect(problems.locator("tr[aria-current=true]")).toContainText("GATE_CLK");
  await page.keyboard.press("Enter");
  await page.waitForURL(/\/nets\/.*run=/);

  await expect(page.getByRole("heading", { level: 1, name: "GATE_CLK" })).toBeVisible();
  await expect(page.getByText(/the driver is .*Ω/i).first()).toBeVisible();
  const [waves, bounces, along] = ["Waveforms", "Bounces", "Along the line at the cursor"].map((name) =>
    page.getByRole("region", { name }).getByRole("img").first(),
  ) as [Locator, Locator, Locator];
  for (const drawing of [waves, bounces, along]) await expect(drawing).toBeVisible();

  // One cursor for all three: moved in the waveforms, it moves in the bounces, along the line and in the address.
  const cursor = page.getByRole("region", { name: "Waveforms" }).getByRole("slider");
  const other = page.getByRole("region", { name: "Bounces" }).getByRole("slider");
  const said = await along.locator("desc").textContent();
  await cursor.focus();
  await cursor.press("Home");
  await cursor.press("PageDown");
  const moment = await cursor.getAttribute("aria-valuenow");
  await expect(other).toHaveAttribute("aria-valuenow", moment ?? "");
  await expect(along.locator("desc")).not.toHaveText(said ?? "");
  await expect(page).toHaveURL(/[?&]t=/);

  const findings = page.getByRole("region", { name: "Findings" });
  await expect(findings.getByText("fail").first()).toBeVisible();
  const resistor = page.getByRole("slider", { name: /^Series resistor.*slider$/ });
  await resistor.focus();
  for (let step = 0; step < 12; step++) await resistor.press("ArrowRight");
  await expect(findings.getByRole("columnheader", { name: "With the change" })).toBeVisible();
  await expect(page).toHaveURL(/[?&]series=/);
  await page.getByRole("button", { name: "Put all back" }).click();
  await expect(page).not.toHaveURL(/[?&]series=/);
  await expectAccessible(page);
});

test("whoever edited cannot waive; the reviewer flags, waives, accepts what is missing and signs off", async ({
  as,
}) => {
  const owner = await as("owner");
  await openProblem(owner, "fail");
  await waive(owner, "The owner would rather not wait for a reviewer.");
  await expect(owner.getByRole("dialog")).toContainText("You edited this draft");

  const page = await as("reviewer");
  await openProblem(page, "fail");
  await page.keyboard.press("f");
  const flag = page.getByRole("dialog");
  await flag.getByLabel("Comment").fill("Can this clock have a 33 Ω resistor at its driver?");
  await flag.getByLabel("Assign to").selectOption({ label: `${readAccount("designer").name}, designer` });
  await flag.getByRole("button", { name: "Flag", exact: true }).click();
  await expect(flag).toHaveCount(0);

  await visit(page, `/projects/${project}/runs/${run}?verdict=fail`);
  const problems = page.getByRole("table", { name: "Problems, worst first" });
  await problems.getByRole("checkbox", { name: "Tick all rows" }).check();
  await page.getByRole("button", { name: "Waive", exact: true }).click();
  await waive(page, "Measured on the breadboard within the latch's own limits.", { open: true });
  await expect(page.getByRole("dialog")).toHaveCount(0);
  await expect(problems.getByRole("row").nth(1)).toContainText("waived");

  await visit(page, `/projects/${project}/review?tab=missing`);
  const missing = page.getByRole("table", { name: "Missing inputs" });
  await expect(missing).toBeVisible();
  const accept = missing.getByRole("button", { name: "Accept with reason" });
  for (let left = await accept.count(); left > 0; left--) {
    await accept.first().click();
    const dialog = page.getByRole("dialog");
    await dialog.getByLabel("Reason").fill("A spare that is not fitted on this build.");
    await dialog.getByRole("button", { name: "Accept", exact: true }).click();
    await expect(dialog).toHaveCount(0);
    await expect(accept).toHaveCount(left - 1);
  }

  await page.getByRole("tab", { name: /^Flags/ }).click();
  await page.getByRole("table", { name: "Flags" }).getByRole("row").nth(1).click();
  const thread = page.getByRole("complementary").filter({ hasText: "33 Ω resistor at its driver" });
  await expect(thread).toBeVisible();
  await thread.getByRole("button", { name: /^Resolve/ }).click();
  await expect(page.getByRole("table", { name: "Flags" })).toContainText("resolved");

  await page.getByRole("button", { name: /^Sign off run/ }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Sign off" }).click();
  await expect(page.getByText(/signed run \d/)).toBeVisible();
  await expect(page.getByText("Nothing. Revision A can be released.")).toBeVisible();
  await expectAccessible(page);
});

test("the reviewer releases to a fabricator; report and note are downloaded and their manifest verifies", async ({
  as,
}) => {
  const page = await as("reviewer");
  const fabricator = readAccount("manufacturer");
  await visit(page, `/projects/${project}/releases`);
  await page.getByLabel("Title").fill("First build");
  await page.getByLabel("Remarks to the fabricator").fill("Coupons on every panel.");
  await page.getByLabel("Name", { exact: true }).fill(fabricator.name);
  await page.getByLabel("E-mail", { exact: true }).fill(fabricator.email);
  await page.getByLabel("Company").fill("Estuary Circuits");
  await page.getByRole("button", { name: "Release revision A" }).click();
  const sure = page.getByRole("alertdialog").or(page.getByRole("dialog"));
  await expect(sure).toContainText("This freezes");
  await sure.getByRole("button", { name: "Release revision A" }).click();
  await page.waitForURL(/\/releases\/[^/]+$/);
  release = /releases\/([^/?]+)/.exec(page.url())?.[1] ?? "";
  await expect(page.getByRole("heading", { level: 1 })).toContainText(board);
  await expectAccessible(page);

  const api = `/api/v1/projects/${project}/releases/${release}`;
  const [zip] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "Download rule report" }).click(),
  ]);
  const files = unzip(await bytesOf(zip));
  const manifest = JSON.parse(files.get("manifest.json")?.toString("utf8") ?? "{}") as {
    files: { name: string; bytes: number; sha256: string }[];
  };
  expect(manifest.files.map(({ name }) => name).sort()).toEqual(
    [...files.keys()].filter((name) => name !== "manifest.json").sort(),
  );
  for (const { name, bytes, sha256 } of manifest.files) {
    const content = files.get(name);
    expect(content?.length, name).toBe(bytes);
    expect(
      createHash("sha256")
        .update(content ?? "")
        .digest("hex"),
      name,
    ).toBe(sha256);
  }
  expect([...files.keys()].some((name) => name.endsWith(".svg"))).toBe(true);
  const again = await page.request.get(`${api}/report`);
  expect(sha256(await again.body())).toBe(sha256(await bytesOf(zip)));

  const [csv] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "Download CSV" }).click(),
  ]);
  expect(await textOf(csv)).toContain("L1 Top");
  noteLink = await linkFromMail(page, fabricator.email, "/note/");
});

test("the link in the mail opens the note and nothing else", async ({ quietPage: page }) => {
  const answer = await visit(page, noteLink);
  expect(answer?.status()).toBe(200);
  await expect(page.getByRole("heading", { level: 1 })).toContainText(board);
  await expectAccessible(page);
  const [csv] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "Download CSV" }).click(),
  ]);
  expect(await textOf(csv)).toContain("L1 Top");
  await page.goto(`/projects/${project}/releases/${release}`);
  await page.waitForURL("**/sign-in?next=*");
  const elsewhere = noteLink.replace(/\/note\/.*$/, `/note/${"A".repeat(43)}`);
  expect((await page.goto(elsewhere))?.status()).toBe(404);
});

test("the fabricator's account sees the note, downloads and acknowledges it; all else is not found", async ({
  as,
}) => {
  const page = await as("manufacturer");
  await visit(page, "/fabrication");
  await page.getByRole("link", { name: `${board}, revision A` }).click();
  await page.waitForURL(`**/fabrication/${release}`);
  const [csv] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "Download CSV" }).click(),
  ]);
  expect(await textOf(csv)).toContain("L1 Top");
  await page.getByLabel("A word to the team, if you like").fill("Received; pressing next week.");
  await page.getByRole("button", { name: "Acknowledge" }).click();
  await expect(page.getByText(/^Acknowledged by/)).toBeVisible();
  await expectAccessible(page);

  const places = [
    "overview",
    "stackup",
    "impedance",
    "classes",
    "nets",
    "rules",
    "runs",
    "review",
    "releases",
  ];
  for (const place of [
    ...places.map((name) => `/projects/${project}/${name}`),
    "/projects",
    "/team",
    "/audit",
  ]) {
    await page.goto(place);
    // There is nothing there for them: they are shown what was sent to them.
    await expect(page).toHaveURL(/\/fabrication$/);
    await expect(page.getByRole("main")).not.toContainText("GATE_CLK");
  }
  const api = `/api/v1/projects/${project}`;
  for (const path of [
    "/api/v1/projects",
    "/api/v1/audit",
    api,
    ...["stackup", "classes", "models", "nets", "parts", "rules", "runs", "waivers", "flags", "releases"].map(
      (name) => `${api}/${name}`,
    ),
    `${api}/runs/${run}/problems`,
    `${api}/runs/${run}/findings/csv`,
    `${api}/releases/${release}/report`,
    `${api}/releases/${release}/note`,
  ])
    expect((await page.request.get(path)).status(), path).toBe(404);
});

test("the team sees that the note was opened, downloaded and acknowledged", async ({ as }) => {
  const page = await as("designer");
  await visit(page, `/projects/${project}/releases/${release}`);
  const recipients = page.getByRole("region", { name: "Recipients" });
  await expect(recipients).toContainText("Received; pressing next week.");
  await expect(recipients).not.toContainText("not yet");
  await visit(page, `/projects/${project}/overview`);
  await expect(page.getByRole("button", { name: "Start a new draft" })).toBeVisible();
});

async function pasteList(page: Page, text: string): Promise<void> {
  await visit(page, `/projects/${project}/nets/import`);
  await page.getByLabel("Or paste from a spreadsheet").fill(text);
  await page.getByRole("button", { name: "Read the paste" }).click();
}

async function openProblem(page: Page, verdict: string): Promise<void> {
  await visit(page, `/projects/${project}/runs/${run}?verdict=${verdict}`);
  const problems = page.getByRole("table", { name: "Problems, worst first" });
  await expect(problems).toBeVisible();
  await page.keyboard.press("j");
  await expect(problems.locator("tr[aria-current=true]")).toBeVisible();
}

async function waive(page: Page, reason: string, { open = false } = {}): Promise<void> {
  if (!open) await page.keyboard.press("w");
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Reason").fill(reason);
  await dialog.getByLabel("Valid until").fill(`${new Date().getUTCFullYear() + 1}-02-01`);
  await dialog.getByRole("button", { name: "Waive", exact: true }).click();
}

async function bytesOf(download: Download): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of await download.createReadStream()) parts.push(part as Buffer);
  return Buffer.concat(parts);
}

async function textOf(download: Download): Promise<string> {
  return (await bytesOf(download)).toString("utf8");
}

function sha256(content: Buffer): string {
  return createHash("sha256").update(content).digest("hex");
}
