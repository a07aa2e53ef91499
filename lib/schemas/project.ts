import { z } from "zod";
import { nameText, version } from "./common";

export const boardUnits = ["mm", "mil"] as const;
export const projectInput = z.object({
  name: nameText(80),
  description: z.string().trim().max(500).default(""),
  unit: z.enum(boardUnits).default("mm"),
  template: z.string().max(40).nullable().default(null),
});
export const projectUpdate = z.object({
  version,
  name: nameText(80),
  description: z.string().trim().max(500),
  unit: z.enum(boardUnits),
});
export interface ProjectSummary {
  id: string;
  name: string;
  description: string;
  unit: "mm" | "mil";
  version: number;
  draftLetter: string | null;
  releasedLetter: string | null;
  netCount: number;
  updatedAt: number;
}
export interface RevisionSummary {
  id: string;
  letter: string;
  state: "draft" | "released";
  createdAt: number;
  releasedAt: number | null;
}
