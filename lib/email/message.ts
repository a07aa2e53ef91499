import "server-only";

export interface Message {
  to: string;
  subject: string;
  text: string;
  html: string;
}

export interface Letter {
  to: string;
  subject: string;
  /** Paragraphs of plain text. */
  lines: readonly string[];
  /** The one thing to do, if there is one. */
  link?: { label: string; url: string };
  /** What stands below the link. */
  after?: readonly string[];
}

/** A message as text and as simple HTML that says the same; nothing in it is fetched from anywhere. */
export function writeMessage({ to, subject, lines, link, after = [] }: Letter): Message {
  const plain = [...lines, ...(link ? [`${link.label}:\n${link.url}`] : []), ...after, "Ringfence"].join(
    "\n\n",
  );
  const paragraph = (text: string) => `<p style="margin:0 0 16px">${escapeHtml(text)}</p>`;
  const button = link
    ? `<p style="margin:0 0 16px"><a href="${escapeHtml(link.url)}">${escapeHtml(link.label)}</a></p>` +
      `<p style="margin:0 0 16px;font-size:13px;word-break:break-all">${escapeHtml(link.url)}</p>`
    : "";
  const html =
    `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(subject)}</title></head>` +
    `<body style="font-family:sans-serif;font-size:15px;line-height:1.5;max-width:36em;margin:24px">` +
    `${lines.map(paragraph).join("")}${button}${after.map(paragraph).join("")}` +
    `<p style="margin:0;color:#555">Ringfence</p></body></html>`;
  return { to, subject: oneLine(subject), text: `${plain}\n`, html };
}

/** Names come from people: a line end in one must not begin a header. */
function oneLine(text: string): string {
  return text.replace(/\s+/gu, " ").trim();
}

function escapeHtml(text: string): string {
  const named: Record<string, string> = {
    "&": "&amp;",
    "<": "&lt;",
    ">": "&gt;",
    '"': "&quot;",
    "'": "&#39;",
  };
  return text.replace(/[&<>"']/g, (character) => named[character] ?? character);
}
