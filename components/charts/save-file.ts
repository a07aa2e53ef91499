import type { Drawing } from "@/lib/drawings/marks";
import { svgString } from "@/lib/drawings/svg-string";

/** Sharp on a dense screen and in print. */
const PNG_SCALE = 3;

/** Hands a file to the browser's download. */
export function save(name: string, content: Blob): void {
  const url = URL.createObjectURL(content);
  const link = document.createElement("a");
  link.href = url;
  link.download = name;
  link.click();
  URL.revokeObjectURL(url);
}

/** A drawing as a PNG, in the colours of light paper. */
export async function pngOf(drawing: Drawing): Promise<Blob> {
  const url = URL.createObjectURL(new Blob([svgString(drawing)], { type: "image/svg+xml" }));
  try {
    const image = new Image();
    image.src = url;
    await image.decode();
    const canvas = document.createElement("canvas");
    canvas.width = Math.ceil(drawing.width * PNG_SCALE);
    canvas.height = Math.ceil(drawing.height * PNG_SCALE);
    const context = canvas.getContext("2d");
    if (!context) throw new Error("No 2-D canvas.");
    context.scale(PNG_SCALE, PNG_SCALE);
    context.drawImage(image, 0, 0, drawing.width, drawing.height);
    return await new Promise((done, failed) =>
      canvas.toBlob((blob) => (blob ? done(blob) : failed(new Error("No picture."))), "image/png"),
    );
  } finally {
    URL.revokeObjectURL(url);
  }
}
