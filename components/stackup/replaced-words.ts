import { isCopper } from "@/lib/si/stackup";
import type { EditStackup } from "./edit-layer";

/** What is lost when another stackup is put in this one's place, and how to get it back. */
export function replacedWords({ name, layers }: EditStackup): string {
  const copper = layers.filter(isCopper);
  const names = copper.slice(0, 4).map((layer) => layer.name);
  const more = copper.length > 4 ? ` and ${copper.length - 4} more` : "";
  return `This replaces the ${layers.length} layers of “${name}”${copper.length > 0 ? ` with its copper ${names.join(", ")}${more}` : ""}. Layers of the same name stay what classes and routes are bound to. Undo brings the present ones back.`;
}
