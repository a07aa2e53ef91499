import type { Ink } from "./palette";

/** total: ink; incident: copper; reflected: violet, dashed; source: ink, thin and dotted. */
export type WaveRole = "total" | "incident" | "reflected" | "source";

/** The look of a wave by what it is; one that is not in focus stands back. */
export function waveStyle(
  role: WaveRole = "total",
  focused = true,
): { stroke: Ink; weight: number; dash?: string; opacity?: number } {
  const opacity = focused ? undefined : 0.55;
  switch (role) {
    case "total":
      return { stroke: "ink", weight: focused ? 2 : 1.4, opacity };
    case "incident":
      return { stroke: "copper", weight: 1.5, opacity };
    case "reflected":
      return { stroke: "violet", weight: 1.5, dash: "5 3", opacity };
    case "source":
      return { stroke: "ink-soft", weight: 1.2, dash: "1.5 3" };
  }
}
