import type { Page } from "@playwright/test";
import { expect, expectAccessible, expectNoSidewaysScroll, test, visit } from "./support";

test("a team's own material is added, removed and brought back, edited, and fills in a layer with its source", async ({
  as,
}) => {
  const page = await as("designer");
  const name = `Estuary core ${crypto.randomUUID().slice(0, 8)}`;
  await visit(page, "/materials");
  const table = page.getByRole("table", { name: "Materials" });
  await expect(table.getByRole("row", { name: /^Glass-epoxy, standard generic/ })).toBeVisible();
  await expectAccessible(page);
  await expectNoSidewaysScroll(page);

  await page.getByRole("button", { name: "Add a material" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("button", { name: "Add", exact: true }).click();
  await expect(dialog.getByText("Give it a name.")).toBeVisible();
  await expectAccessible(page);
  await dialog.getByRole("textbox", { name: "Name", exact: true }).fill(name);
  await dialog.getByLabel("Dk", { exact: true }).fill("3,62");
  await dialog.getByLabel("Df (may stay empty)").fill("0.0041");
  await dialog.getByLabel("Dk and Df at").fill("10 GHz");
  await dialog.getByLabel("Thickness (may stay empty)").fill("8 mil");
  await dialog.getByLabel("Source of these values").fill("Data sheet of the invented maker, table 2");
  await dialog.getByRole("button", { name: "Add", exact: true }).click();
  await expect(dialog).toBeHidden();

  await page.getByRole("searchbox", { name: "Search" }).fill(name);
  const row = table.getByRole("row", { name: new RegExp(name) });
  await expect(row).toContainText("0.2032");
  await act(page, name, "Remove");
  await expect(row).toBeHidden();
  await page.getByRole("button", { name: "Undo" }).click();
  await expect(row).toBeVisible();

  await act(page, name, "Edit");
  await page.getByRole("dialog").getByLabel("Dk", { exact: true }).fill("3.65");
  await page.getByRole("dialog").getByRole("button", { name: "Save" }).click();
  await expect(row).toContainText("3.65");
  await page.getByRole("button", { name: "Copy as CSV" }).click();
  await expect(page.getByRole("button", { name: "Copied" })).toBeVisible();
  expect(await page.evaluate(() => navigator.clipboard.readText())).toContain(
    `${name},laminate,team,,,3.65,0.0041,10 GHz,3.65,8 mil,`,
  );

  const made = await page.request.post("/api/v1/projects", {
    data: { name: `Weir board ${name}`, description: "", unit: "mm", template: "4-layers" },
  });
  expect(made.ok(), await made.text()).toBe(true);
  const { id: project } = (await made.json()) as { id: string };
  await visit(page, `/projects/${project}/stackup`);
  const core = page.getByRole("row", { name: "5, Core 2-3" });
  await core.getByLabel("Dk").click();
  await page.getByRole("button", { name: "Fill in a material" }).click();
  await page.getByRole("menuitem", { name: new RegExp(name) }).click();
  await expect(core.getByLabel("Dk")).toHaveValue("3.65");
  await expect(core.getByLabel("Thickness")).toHaveValue("0.2032 mm");
  await expect(page.getByRole("textbox", { name: "Source note" })).toHaveValue(
    "Data sheet of the invented maker, table 2",
  );
  const layer = page.getByRole("region", { name: "Layer Core 2-3" });
  await expect(layer.getByLabel("Origin of these values")).toHaveValue("data sheet");
  await expect(page.getByRole("status").filter({ hasText: /^Saved$/ })).toBeVisible();
  await page.reload();
  await expect(core.getByLabel("Dk")).toHaveValue("3.65");
  await expectAccessible(page);
});

test("a reviewer reads the materials, and changes none", async ({ as }) => {
  const page = await as("reviewer");
  await visit(page, "/materials?kind=foil");
  await expect(page.getByRole("table", { name: "Materials" })).toContainText("Reverse-treated");
  await expect(page.getByRole("button", { name: "Add a material" })).toBeHidden();
  await expect(page.getByRole("button", { name: /^Acts on/ })).toHaveCount(0);
});

async function act(page: Page, name: string, what: string): Promise<void> {
  await page.getByRole("button", { name: `Acts on ${name}` }).click();
  await page.getByRole("menuitem", { name: what }).click();
}
