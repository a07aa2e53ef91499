import type { ReactNode } from "react";
import type { ImpedanceNote, NoteLine } from "@/lib/schemas/release";
import { formatQuantity, formatSiParts } from "@/lib/si/units";
import { NoteSection } from "./note-section";

interface Props {
  note: ImpedanceNote;
  noteHash: string;
  /** Downloads and answers, above the note; not printed. */
  actions?: ReactNode;
}

/** The impedance-control note as its reader sees and prints it: what to build, on what, to what. */
export function NoteSheet({ note, noteHash, actions }: Props) {
  const thickness = formatSiParts(note.totalThickness_m, "length", { unit: "mm", digits: 4 });
  return (
    <article className="flex flex-col gap-6">
      <header className="border-ink flex flex-wrap items-start justify-between gap-4 border-b-2 pb-4">
        <div className="min-w-0">
          <p className="text-ink-soft text-sm">Impedance-control note</p>
          <h1 className="text-xl font-semibold break-words">
            {note.project}, revision {note.revision}
          </h1>
          <p className="mt-1">{note.title}</p>
        </div>
        {actions ? <div className="flex flex-wrap gap-2 print:hidden">{actions}</div> : null}
      </header>

      <dl className="grid grid-cols-2 gap-x-6 gap-y-3 text-sm sm:grid-cols-4">
        <Fact term="From">{note.team}</Fact>
        <Fact term="Released">
          <time dateTime={new Date(note.releasedAt).toISOString()}>{day(note.releasedAt)}</time>
        </Fact>
        <Fact term="Signed off by">{note.signedBy}</Fact>
        <Fact term="Thickness over mask">
          {thickness.text} <span className="text-ink-soft">{thickness.unit}</span>
        </Fact>
      </dl>
      {note.remarks ? <p className="max-w-prose whitespace-pre-wrap">{note.remarks}</p> : null}

      <section>
        <h2 className="mb-2 text-lg font-semibold">Controlled lines</h2>
        <div
          className="scroll-hint-paper overflow-x-auto"
          tabIndex={0}
          role="region"
          aria-label="Controlled lines"
        >
          <table className="w-full min-w-[58rem] border-collapse text-sm">
            <thead>
              <tr className="border-ink border-b text-left">
                <Head>Line</Head>
                <Head>Layer</Head>
                <Head>Structure</Head>
                <Head end>Foot width</Head>
                <Head end>Gap</Head>
                <Head end>Target</Head>
                <Head end>Tolerance</Head>
                <Head end>Predicted</Head>
                <Head end>By formula</Head>
                <Head end>Spread and yield</Head>
                <th scope="col" className="py-1.5 pl-3 font-medium">
                  References
                </th>
              </tr>
            </thead>
            <tbody>
              {note.lines.map((line) => (
                <LineRow key={line.line} line={line} />
              ))}
            </tbody>
          </table>
        </div>
        {note.lines.length === 0 ? (
          <p className="text-ink-soft py-4">This revision controls no line.</p>
        ) : null}
        <p className="text-ink-soft mt-2 max-w-prose text-xs">
          Foot width is the finished width of the trace where it meets its laminate. Predicted values come
          from a two-dimensional field solution of the finished cross-section, solder mask included; beside
          them stands the published formula that fits best, named in the CSV. The spread holds 99 % of
          production as predicted from the process tolerances, and its yield is the share within the
          tolerance.
        </p>
      </section>

      <section className="break-inside-avoid">
        <h2 className="mb-2 text-lg font-semibold">Stackup</h2>
        <NoteSection layers={note.stackup} />
      </section>

      <footer className="border-rule-line text-ink-soft border-t pt-4 text-xs">
        <p className="max-w-prose">{note.caution}</p>
        <p className="mt-2 break-all">
          SHA-256 of this note: <span className="font-mono">{noteHash}</span>
        </p>
      </footer>
    </article>
  );
}

function LineRow({ line }: { line: NoteLine }) {
  return (
    <tr className="border-rule-line border-b align-top">
      <td className="py-1.5 pr-3 tabular-nums">{line.line}</td>
      <td className="py-1.5 pr-3">{line.layer}</td>
      <td className="py-1.5 pr-3">
        {line.kind === "single" ? "single-ended" : "differential pair"}
        <span className="text-ink-soft block text-xs">{line.className.join(", ")}</span>
      </td>
      <Amount text={formatQuantity(line.width)} />
      <Amount text={line.gap ? formatQuantity(line.gap) : "–"} />
      <Amount text={`${trim(line.targetOhms)} Ω`} />
      <Amount text={`±${trim(line.tolerancePercent)} %`} />
      <Amount text={line.predictedOhms === null ? "no data" : `${line.predictedOhms.toFixed(1)} Ω`} />
      <Amount text={formulaText(line)} />
      <Amount text={spreadText(line)} />
      <td className="py-1.5 pl-3">{line.references || "–"}</td>
    </tr>
  );
}

function formulaText({ closedForm }: NoteLine): string {
  if (!closedForm) return "–";
  return `${closedForm.ohms.toFixed(1)} Ω${closedForm.inRange ? "" : ", out of range"}`;
}

function spreadText({ spread }: NoteLine): string {
  if (!spread) return "–";
  return `${spread.low.toFixed(1)} to ${spread.high.toFixed(1)} Ω, ${(100 * spread.yield).toFixed(1)} %`;
}

function Amount({ text }: { text: string }) {
  return <td className="py-1.5 pr-3 text-right whitespace-nowrap tabular-nums">{text}</td>;
}

function Head({ children, end = false }: { children: ReactNode; end?: boolean }) {
  return (
    <th scope="col" className={`py-1.5 pr-3 font-medium ${end ? "text-right" : ""}`}>
      {children}
    </th>
  );
}

function Fact({ term, children }: { term: string; children: ReactNode }) {
  return (
    <div className="min-w-0">
      <dt className="text-ink-soft">{term}</dt>
      <dd className="break-words">{children}</dd>
    </div>
  );
}

/** UTC, so that server and reader agree on the day. */
function day(at: number): string {
  return new Date(at).toLocaleDateString("en-GB", {
    day: "numeric",
    month: "long",
    year: "numeric",
    timeZone: "UTC",
  });
}

function trim(value: number): string {
  return String(Number(value.toPrecision(6)));
}
