"use client";

import { useMemo, useState } from "react";
import { save } from "@/components/charts/save-file";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/input";
import { decodeText, normaliseText } from "@/lib/formats/delimited/decode";
import { badRowsCsv } from "@/lib/formats/lists/bad-rows";
import { readStackupList, type StackupListReading } from "@/lib/formats/stackup-list/read";
import type { StackupDoc } from "@/lib/schemas/stackup";
import type { EditStackup } from "./edit-layer";
import { withoutBadRows } from "./good-rows";
import { replacedWords } from "./replaced-words";
import { useStackupUnits } from "./stackup-units";

interface Props {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  present: EditStackup;
  onTake: (doc: StackupDoc) => void;
}

interface Read {
  reading: StackupListReading | null;
  /** what can be taken: all of it, or what remains without the bad rows */
  doc: StackupDoc | null;
  badRows: number;
  error: string | null;
}

/** A stackup from a CSV file or a paste: what it would be, every row that is wrong, and nothing until one confirms. */
export function ImportDialog({ open, onOpenChange, present, onTake }: Props) {
  const { project } = useStackupUnits();
  const [text, setText] = useState("");
  const [name, setName] = useState(present.name);
  const [trouble, setTrouble] = useState<string | null>(null);
  const read = useMemo(() => readText(text, name, project), [text, name, project]);
  const { reading, doc, badRows } = read;
  const error = trouble ?? read.error;

  async function takeFile(file: File | undefined): Promise<void> {
    if (!file) return;
    try {
      const decoded = decodeText(new Uint8Array(await file.arrayBuffer()), 5 * 1024 * 1024);
      setTrouble(null);
      setText(decoded.text);
      setName(file.name.replace(/\.[a-z]{2,4}$/i, "").slice(0, 80) || present.name);
    } catch (reason) {
      setTrouble(reason instanceof Error ? reason.message : "The file could not be read.");
    }
  }

  return (
    <Dialog
      wide
      open={open}
      onOpenChange={onOpenChange}
      title="Import a stackup"
      description={`One row a layer, from top to bottom, below a header row with at least kind and name. Lengths without a unit are read as ${project}. The export of a stackup shows every column.`}
      footer={
        <>
          <Button onClick={() => onOpenChange(false)}>Keep the present one</Button>
          <Button
            variant="primary"
            disabled={!doc}
            onClick={() => {
              if (!doc) return;
              onTake(doc);
              setText("");
              onOpenChange(false);
            }}
          >
            {!doc
              ? "Take the layers"
              : badRows > 0
                ? `Take the ${doc.layers.length} good ${doc.layers.length === 1 ? "row" : "rows"}, leave out ${badRows}`
                : `Take ${doc.layers.length} layers`}
          </Button>
        </>
      }
    >
      <label className="flex flex-col gap-1 text-sm font-medium">
        File
        <input
          type="file"
          accept=".csv,.tsv,.txt,text/csv,text/tab-separated-values,text/plain"
          className="file:border-field-line file:bg-sheet file:text-ink text-ink-soft text-sm font-normal file:mr-3 file:h-8 file:cursor-pointer file:rounded file:border file:border-solid file:px-3 file:text-sm file:font-medium"
          onChange={(event) => void takeFile(event.target.files?.[0])}
        />
      </label>
      <TextArea
        label="Or paste from a spreadsheet"
        rows={6}
        className="font-mono text-xs"
        value={text}
        onChange={(event) => {
          setTrouble(null);
          setText(event.target.value);
        }}
        error={error}
      />
      {reading && reading.problems.length > 0 ? <Problems reading={reading} /> : null}
      {doc ? (
        <p className="text-sm">
          {doc.layers.map((layer) => layer.name).join(", ")}
          {". "}
          {present.layers.length > 0 ? replacedWords(present) : null}
        </p>
      ) : null}
    </Dialog>
  );
}

function Problems({ reading }: { reading: StackupListReading }) {
  const { problems } = reading;
  return (
    <div>
      <div className="flex items-center justify-between gap-2">
        <p className="text-fail text-sm">
          {problems.length === 1 ? "1 cell is" : `${problems.length} cells are`} not as needed, of{" "}
          {reading.rows} rows.
        </p>
        <Button
          variant="quiet"
          onClick={() =>
            save(
              "stackup rows not taken.csv",
              new Blob([badRowsCsv({ problems, duplicates: [] })], { type: "text/csv;charset=utf-8" }),
            )
          }
        >
          Save this list
        </Button>
      </div>
      <div className="border-rule-line max-h-48 overflow-auto border-y">
        <table className="w-full text-left text-xs">
          <thead>
            <tr className="text-ink-soft">
              <th className="px-2 py-1 font-normal">Row</th>
              <th className="px-2 py-1 font-normal">Column</th>
              <th className="px-2 py-1 font-normal">Value</th>
              <th className="px-2 py-1 font-normal">Reason</th>
            </tr>
          </thead>
          <tbody>
            {problems.map((problem, index) => (
              <tr key={index} className="border-rule-line/60 border-t align-top">
                <td className="px-2 py-1">{problem.row}</td>
                <td className="px-2 py-1 whitespace-nowrap">{problem.column}</td>
                <td className="px-2 py-1 font-mono">{problem.value || "–"}</td>
                <td className="px-2 py-1">{problem.reason}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}

function readText(text: string, name: string, unit: string): Read {
  const none = { reading: null, doc: null, badRows: 0, error: null };
  if (text.trim() === "") return none;
  try {
    const plain = normaliseText(text);
    const reading = readStackupList(plain, name, unit);
    const doc = reading.doc ?? withoutBadRows(plain, reading, name, unit);
    const badRows = reading.doc ? 0 : new Set(reading.problems.map(({ row }) => row)).size;
    return { reading, doc: doc && doc.layers.length > 0 ? doc : null, badRows, error: null };
  } catch (error) {
    return { ...none, error: error instanceof Error ? error.message : "This could not be read." };
  }
}
