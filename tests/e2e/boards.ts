import type { Page } from "@playwright/test";
import { expect } from "./support";

/** The demo's boards: one that a person could have drawn, one from a seed for long tables. */
export const BOARDS = { small: "Tide gauge controller", large: "Estuary array backplane" } as const;

/** The API as this page's person sees it. */
export async function read<T>(page: Page, path: string): Promise<T> {
  const answer = await page.request.get(`/api/v1${path}`);
  expect(answer.status(), path).toBe(200);
  return (await answer.json()) as T;
}

export async function projectId(page: Page, name: string): Promise<string> {
  const { projects } = await read<{ projects: { id: string; name: string }[] }>(page, "/projects");
  const found = projects.find((project) => project.name === name);
  if (!found) throw new Error(`There is no project ${name}.`);
  return found.id;
}

export interface ListedRun {
  id: string;
  letter: string;
  state: string;
}

/** The newest finished run of the draft. */
export async function draftRun(page: Page, project: string): Promise<ListedRun> {
  const { runs, draft } = await read<{ runs: ListedRun[]; draft: { letter: string } | null }>(
    page,
    `/projects/${project}/runs`,
  );
  const run = runs.find((entry) => entry.letter === draft?.letter && entry.state === "done");
  if (!run) throw new Error("The draft has no finished run.");
  return run;
}

export interface ListedNet {
  id: string;
  lineageId: string;
  name: string;
}

export async function listNets(page: Page, project: string): Promise<ListedNet[]> {
  return (await read<{ nets: ListedNet[] }>(page, `/projects/${project}/nets`)).nets;
}
