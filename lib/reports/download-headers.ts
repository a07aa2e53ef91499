import "server-only";

/** Headers of a file that is saved, not shown; the name in plain ASCII and in full (RFC 6266). */
export function downloadHeaders(type: string, name: string): Record<string, string> {
  const safe = name.replace(/[\\/:*?"<>|\p{Cc}]+/gu, "-");
  const ascii = safe.replace(/[^\x20-\x7e]+/g, "_");
  return {
    "content-type": type,
    "content-disposition": `attachment; filename="${ascii}"; filename*=UTF-8''${encodeURIComponent(safe)}`,
    "cache-control": "private, no-store",
    "x-content-type-options": "nosniff",
  };
}
