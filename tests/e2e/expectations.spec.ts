/** What users expect without its being said, each tried on a board of its own or on the demo's. */
import type { Locator, Page } from "@playwright/test";
import { BOARDS, draftRun, projectId, read } from "./boards";
import { linkFromMail } from "./mail";
import type { DemoAccount } from "./people";
import { expect, expectAccessible, test, visit, write } from "./support";

test.describe.configure({ mode: "parallel" });

const NETS = [
  "net\tfrom\tto\tlayer\twidth_mm\tlength_mm",
  "SLUICE_A\tU1.1\tU2.1\tL1 Top\t0.2\t12",
  "SLUICE_B\tU1.2\tU2.2\tL1 Top\t0.2\t13",
  "PUMP_ON\tU1.3\tU2.3\tL3 Inner\t0.15\t25.4",
].join("\n");

test("undo takes back an edit by keys and by button, also after the page was left", async ({ as }) => {
  const page = await as("designer");
  const project = await newBoard(page);
  await visit(page, `/projects/${project}/stackup`);
  const layers = page.getByRole("table", { name: "Layers, top to bottom" });
  const count = await layers.getByRole("row").count();
  await layers.getByRole("row", { name: "3, Prepreg 1-2" }).click({ position: { x: 8, y: 8 } });
  await page.getByRole("button", { name: "Remove", exact: true }).click();
  await expect(layers.getByRole("row")).toHaveCount(count - 1);
  await expectSaved(page);
  await page.keyboard.press("Control+z");
  await expect(layers.getByRole("row")).toHaveCount(count);
  await page.keyboard.press("Control+Shift+Z");
  await expect(layers.getByRole("row")).toHaveCount(count - 1);
  await visit(page, page.url());
  await expect(layers.getByRole("row")).toHaveCount(count - 1);
  await page.getByRole("button", { name: /^Undo/ }).click();
  await expect(layers.getByRole("row")).toHaveCount(count);
});

test("fields read 5 mil, 0,127mm and 1/2 oz; what cannot be read stays with its reason until it is mended", async ({
  as,
}) => {
  const page = await as("designer");
  const project = await newBoard(page);
  await visit(page, `/projects/${project}/stackup`);
  const core = page.getByRole("row", { name: "5, Core 2-3" });
  const thickness = core.getByLabel("Thickness");
  for (const [typed, shown] of [
    ["5 mil", "0.127 mm"],
    ["0,15mm", "0.15 mm"],
    ["120um", "0.12 mm"],
    ["0.2", "0.2 mm"],
  ] as const) {
    await write(thickness, typed);
    await core.getByLabel("Dk").focus();
    await expect(thickness, typed).toHaveValue(shown);
  }
  const foil = page.getByRole("row", { name: "4, L2 GND" }).getByLabel("Base foil");
  await write(foil, "1/2 oz");
  await expectSaved(page);

  await write(thickness, "5 parsecs");
  await core.getByLabel("Dk").focus();
  await expect(thickness).toHaveValue("5 parsecs");
  await expect(page.getByText(/5 parsecs.*Write/).first()).toBeVisible();
  await expect(
    page.getByRole("status").filter({ hasText: "Not saved: 1 thing needs mending" }),
  ).toBeVisible();
  await write(thickness, "0.11");
  await expectSaved(page);
  await page.reload();
  await expect(thickness).toHaveValue("0.11 mm");
  await expect(page.getByRole("row", { name: "4, L2 GND" }).getByLabel("Base foil")).toHaveValue(/oz/);
});

test("the mm and mil switch changes every table, and stays", async ({ as }) => {
  const page = await as("designer");
  const project = await projectId(page, BOARDS.small);
  await visit(page, `/projects/${project}/impedance`);
  const table = page.getByRole("table", { name: "Impedance by class and layer" });
  await expect(table).toContainText("mm");
  await page.getByRole("radio", { name: "mil" }).click();
  await expect(table).toContainText("mil");
  await expect(table).not.toContainText("mm");
  await visit(page, `/projects/${project}/nets`);
  await expect(page.getByRole("table", { name: "Nets" })).toContainText("mil");
  await visit(page, `/projects/${project}/stackup`);
  await expect(page.getByRole("table", { name: /^Layers/ })).toContainText("mil");
  // The choice goes with the account: others look at the same boards.
  await page.getByRole("radio", { name: "mm" }).click();
  await expect(page.getByRole("table", { name: /^Layers/ })).toContainText("mm");
});

test("cells copied from a spreadsheet are pasted anywhere on the import page; marks and decimal comma are told", async ({
  as,
}) => {
  const page = await as("designer");
  const project = await newBoard(page);
  await visit(page, `/projects/${project}/nets/import`);
  await expect(page.getByRole("button", { name: "Read the paste" })).toBeVisible();
  await page.evaluate(() => {
    const cells = "net;from;to;layer;width_mm;length_mm\nA;U1.1;U2.1;L1 Top;0,2;12,5\n";
    const clipboardData = new DataTransfer();
    clipboardData.setData("text/plain", cells);
    document.body.dispatchEvent(new ClipboardEvent("paste", { clipboardData, bubbles: true }));
  });
  await expect(page.getByRole("heading", { name: "1 of 1 row can be taken" })).toBeVisible();
  await expect(page.getByRole("checkbox", { name: "Decimal comma" })).toBeChecked();
  await expect(page.getByLabel("Between cells")).toHaveValue(";");
});

test("several nets are changed at once, and one undo takes all of it back", async ({ as }) => {
  const page = await as("designer");
  const project = await newBoard(page);
  await importNets(page, project);
  await visit(page, `/projects/${project}/nets`);
  const nets = page.getByRole("table", { name: "Nets" });
  for (const name of ["SLUICE_A", "SLUICE_B"])
    await nets
      .getByRole("row", { name: new RegExp(name) })
      .getByRole("checkbox")
      .check();
  const form = page.getByRole("form", { name: "Change the ticked nets" });
  await form.getByLabel("Scope").selectOption({ label: "Out: test" });
  await form.getByRole("button", { name: "Change 2 nets" }).click();
  await expect(form).toContainText("Say why these nets are left out.");
  await form.getByLabel("Reason").fill("Only on the bench.");
  await form.getByLabel("Match group").fill("sluices");
  await form.getByRole("button", { name: "Change 2 nets" }).click();
  await expect(page.getByText("2 nets changed")).toBeVisible();
  await expect(page.getByText("1 in scope, 2 out of scope", { exact: false })).toBeVisible();
  await page.getByRole("button", { name: "Undo", exact: true }).last().click();
  await expect(page.getByText("3 in scope, 0 out of scope", { exact: false })).toBeVisible();
});

test("an address restores filters, sorting and the row on which one stood", async ({ as }) => {
  const page = await as("designer");
  const project = await projectId(page, BOARDS.small);
  await visit(page, `/projects/${project}/nets`);
  await page.getByRole("searchbox", { name: "Search" }).fill("SD_DQ");
  await page.getByRole("button", { name: "Net", exact: true }).click();
  await page.getByRole("table", { name: "Nets" }).getByRole("row").nth(3).focus();
  await expect(page).toHaveURL(/q=SD_DQ.*at=/);
  const nets = page.getByRole("table", { name: "Nets" });
  const chosen = await nets.locator("tr[aria-current=true]").innerText();
  const rows = await nets.getByRole("row").count();
  const address = page.url();
  await page.goto("/projects");
  await visit(page, address);
  await expect(nets.locator("tr[aria-current=true]")).toHaveText(chosen.replaceAll(/\s+/g, " "), {
    useInnerText: true,
  });
  await expect(nets.getByRole("row")).toHaveCount(rows);
  await expect(page.getByRole("searchbox", { name: "Search" })).toHaveValue("SD_DQ");
});

test("lists are walked by keyboard: j, k, Home, End, Enter, Esc, x, /, ?", async ({ as, viewport }) => {
  const page = await as("reviewer");
  const project = await projectId(page, BOARDS.small);
  const run = await draftRun(page, project);
  await visit(page, `/projects/${project}/runs/${run.id}`);
  const problems = page.getByRole("table", { name: "Problems, worst first" });
  await expect(problems).toBeVisible();
  if ((viewport?.width ?? 0) < 1024) return walkOnePanelAtATime(page, problems);
  const current = problems.locator("tr[aria-current=true]");
  // The table stands before its keys do, by as long as the page takes to wake.
  await expect(async () => {
    await page.keyboard.press("j");
    await expect(current).toHaveCount(1, { timeout: 500 });
  }).toPass();
  const first = await current.getAttribute("data-row-id");
  await page.keyboard.press("j");
  await expect(current).not.toHaveAttribute("data-row-id", first ?? "");
  await page.keyboard.press("k");
  await expect(current).toHaveAttribute("data-row-id", first ?? "");
  await expect(current).toBeFocused();
  await page.keyboard.press("x");
  await expect(page.getByText("1 problem selected")).toBeVisible();
  await page.keyboard.press("End");
  await expect(current).not.toHaveAttribute("data-row-id", first ?? "");
  await page.keyboard.press("Home");
  await expect(current).toHaveAttribute("data-row-id", first ?? "");
  await page.keyboard.press("?");
  await expect(page.getByRole("dialog", { name: "Keys" })).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(page.getByRole("dialog")).toHaveCount(0);
  await page.keyboard.press("/");
  await expect(page.getByRole("searchbox", { name: "Search" })).toBeFocused();
  await page.keyboard.press("Escape");
  await page.keyboard.press("Escape");
  await expect(current).toHaveCount(0);
  await page.keyboard.press("j");
  await page.keyboard.press("Enter");
  await page.waitForURL(/\/nets\/.*run=|\/impedance/);
});

/** A narrow screen shows the current problem's panel in the table's place; the same keys walk it. */
async function walkOnePanelAtATime(page: Page, problems: Locator) {
  const panel = page.getByRole("main").getByRole("complementary");
  const at = () => new URL(page.url()).searchParams.get("at");
  await expect(async () => {
    await page.keyboard.press("j");
    await expect(panel).toHaveCount(1, { timeout: 500 });
  }).toPass();
  await expect(problems).toBeHidden();
  await expect(panel).toBeFocused();
  await page.keyboard.press("Home");
  await expect.poll(at).not.toBeNull();
  const first = at();
  await page.keyboard.press("j");
  await expect.poll(at).not.toBe(first);
  const second = at();
  await page.keyboard.press("k");
  await expect.poll(at).toBe(first);
  await page.keyboard.press("j");
  await expect.poll(at).toBe(second);
  await page.keyboard.press("x");
  await page.keyboard.press("Escape");
  await expect(panel).toHaveCount(0);
  await expect(page.getByText("1 problem selected")).toBeVisible();
  await expect(problems.locator(`tr[data-row-id="${second}"]`)).toBeFocused();
  await page.keyboard.press("?");
  await expect(page.getByRole("dialog", { name: "Keys" })).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(page.getByRole("dialog")).toHaveCount(0);
  await page.keyboard.press("/");
  await expect(page.getByRole("searchbox", { name: "Search" })).toBeFocused();
  await page.keyboard.press("Escape");
  await page.keyboard.press("j");
  await expect(panel).toHaveCount(1);
  await page.keyboard.press("Enter");
  await page.waitForURL(/\/nets\/.*run=|\/impedance/);
}

test("two people edit one class: the second is told what changed and chooses", async ({ as }) => {
  const one = await as("designer");
  const project = await newBoard(one);
  const name = "Weir data";
  const made = await one.request.post(`/api/v1/projects/${project}/classes`, {
    data: { netClass: { name, kind: "single", targetImpedance: { value: "50", unit: "Ω" } } },
  });
  expect(made.ok(), await made.text()).toBe(true);
  const two = await as("owner");
  for (const page of [one, two]) {
    await visit(page, `/projects/${project}/classes`);
    await page
      .getByRole("table", { name: "Classes" })
      .getByRole("row", { name: new RegExp(name) })
      .click();
  }
  const panel = (page: Page) => page.getByRole("complementary", { name });
  await write(panel(one).getByLabel("Target impedance"), "55");
  await expect(panel(one).getByRole("status")).toHaveText("Saved");

  await write(panel(two).getByLabel("Tolerance ±"), "7 %");
  const conflict = panel(two).getByRole("alert");
  await expect(conflict).toContainText(/changed/i);
  await expect(conflict).toContainText(/impedance|target/i);
  await expectAccessible(two);
  await conflict.getByRole("button", { name: "Keep mine" }).click();
  await expect(panel(two).getByRole("status")).toHaveText("Saved");
  await one.reload();
  await expect(panel(one).getByLabel("Tolerance ±")).toHaveValue("7 %");
});

test("empty pages say what is missing and lead on", async ({ as }) => {
  const page = await as("designer");
  const project = await newBoard(page, null);
  for (const [place, words] of [
    ["stackup", "No layers yet"],
    ["impedance", "No signal layers yet"],
    ["classes", "No classes yet"],
    ["classes?tab=models", "No models yet"],
    ["nets", "No nets yet"],
    ["nets/roles", "No nets to give roles"],
    ["runs", "Nothing has been checked yet"],
    ["review", "Revision A has no finished run"],
    ["releases", "Nothing has been released yet."],
    ["overview", "Nothing has been judged yet."],
  ] as const) {
    await visit(page, `/projects/${project}/${place}`);
    await expect(page.getByRole("main").getByText(words, { exact: false }).first()).toBeVisible();
    expect(
      await page.getByRole("main").getByRole("link").or(page.getByRole("main").getByRole("button")).count(),
      place,
    ).toBeGreaterThan(0);
  }
  await expectAccessible(page);
});

test("the theme is chosen by the person, whatever the device says, and stays", async ({ as }) => {
  const page = await as("designer");
  await visit(page, "/projects");
  const paper = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  for (const [theme, colour] of [
    ["Dark", "rgb(20, 22, 28)"],
    ["Light", "rgb(250, 248, 243)"],
  ] as const) {
    await page.getByRole("button", { name: /^Account of/ }).click();
    await page.getByRole("menuitemradio", { name: theme }).click();
    await expect.poll(paper).toBe(colour);
    await visit(page, "/projects");
    expect(await paper()).toBe(colour);
    await expectAccessible(page);
  }
});

test("a note prints without the chrome around it", async ({ as }) => {
  const page = await as("designer");
  const project = await projectId(page, BOARDS.small);
  const { releases } = await read<{ releases: { id: string }[] }>(page, `/projects/${project}/releases`);
  await visit(page, `/projects/${project}/releases/${releases[0]?.id ?? ""}`);
  await expect(page.getByRole("navigation", { name: "Places" })).toBeVisible();
  await page.emulateMedia({ media: "print" });
  await expect(page.getByRole("navigation", { name: "Places" })).toBeHidden();
  await expect(page.getByRole("banner")).toBeHidden();
  await expect(page.getByRole("link", { name: "Download CSV" })).toBeHidden();
  await expect(page.getByRole("heading", { name: "Controlled lines" })).toBeVisible();
  await expect(page.getByRole("img", { name: "Stackup" })).toBeVisible();
});

test("long work shows how far it is and can be stopped", async ({ as }) => {
  const page = await as("designer");
  const project = await projectId(page, BOARDS.large);
  await visit(page, `/projects/${project}/runs`);
  await page.getByRole("button", { name: "Run the check" }).first().click();
  await expect(page.getByRole("progressbar").first()).toBeVisible();
  await page.getByRole("button", { name: "Cancel" }).first().click();
  const newest = page.getByRole("table", { name: "Runs, newest first" });
  await expect(newest).toContainText("cancelled");
  await expect(page.getByRole("progressbar")).toHaveCount(0);
});

test("ids of another team are not found, as pages and as data", async ({ as, quietPage: stranger }) => {
  const inside = await as("designer");
  const project = await projectId(inside, BOARDS.small);
  const run = await draftRun(inside, project);
  const { releases } = await read<{ releases: { id: string }[] }>(inside, `/projects/${project}/releases`);
  await joinAnotherTeam(stranger);
  for (const place of [
    "overview",
    "stackup",
    "impedance",
    "classes",
    "nets",
    "rules",
    "runs",
    "review",
    "releases",
    `runs/${run.id}`,
    `releases/${releases[0]?.id ?? ""}`,
  ]) {
    const answer = await stranger.goto(`/projects/${project}/${place}`);
    expect(answer?.status(), place).toBe(404);
    await expect(stranger.getByText(BOARDS.small)).toHaveCount(0);
  }
  for (const path of [
    "",
    "/stackup",
    "/classes",
    "/nets",
    "/runs",
    `/runs/${run.id}`,
    `/runs/${run.id}/problems`,
    "/releases",
    `/releases/${releases[0]?.id ?? ""}/report`,
  ])
    expect((await stranger.request.get(`/api/v1/projects/${project}${path}`)).status(), path).toBe(404);
  expect((await read<{ projects: unknown[] }>(stranger, "/projects")).projects).toEqual([]);
});

async function newBoard(page: Page, template: string | null = "6-layers"): Promise<string> {
  const made = await page.request.post("/api/v1/projects", {
    data: { name: `Weir board ${crypto.randomUUID().slice(0, 8)}`, description: "", unit: "mm", template },
  });
  expect(made.ok(), await made.text()).toBe(true);
  return ((await made.json()) as { id: string }).id;
}

async function importNets(page: Page, project: string): Promise<void> {
  await visit(page, `/projects/${project}/nets/import`);
  await page.getByLabel("Or paste from a spreadsheet").fill(NETS);
  await page.getByRole("button", { name: "Read the paste" }).click();
  await page.getByRole("button", { name: "Import 3 rows" }).click();
  await expect(page.getByRole("status").filter({ hasText: "Section list imported" })).toBeVisible();
}

async function expectSaved(page: Page): Promise<void> {
  await expect(page.getByRole("status").filter({ hasText: /^Saved$/ })).toBeVisible();
}

/** A new person with a team of their own. */
async function joinAnotherTeam(page: Page): Promise<void> {
  const someone: Pick<DemoAccount, "name" | "email" | "password"> = {
    name: "Ines Elsewhere",
    email: `ines-${crypto.randomUUID().slice(0, 8)}@example.org`,
    password: "another harbour 77",
  };
  await page.goto("/sign-up");
  await page.getByLabel("Your name").fill(someone.name);
  await page.getByLabel("E-mail address").fill(someone.email);
  await page.getByLabel("Password").fill(someone.password);
  await page.getByRole("button", { name: "Make the account" }).click();
  await expect(page.getByRole("heading", { name: "Confirm your address" })).toBeVisible();
  await page.goto(await linkFromMail(page, someone.email, "verify-email"));
  await page.goto("/create-team");
  await page.getByLabel("Name of the team").fill("Elsewhere Boards");
  await page.getByRole("button", { name: "Make the team" }).click();
  await page.waitForURL("**/projects");
}
