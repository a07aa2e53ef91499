"use client";

import { type KeyboardEvent, useMemo, useRef } from "react";
import { cn } from "@/components/ui/class-names";
import { fractionDigits, NumberText } from "@/components/ui/number-text";
import { VerdictShape } from "@/components/ui/verdict-mark";
import type { LayerKind } from "@/lib/schemas/stackup";
import { builtThicknessExact, isCopper } from "@/lib/si/stackup";
import { type EditLayer, documentOf } from "./edit-layer";
import { moveLayer, withKind } from "./layer-edits";
import { LayerText } from "./layer-text";
import { KindSelect } from "./kind-select";
import { columnLength } from "./layer-field-text";
import type { StackupWarning } from "@/lib/si/stackup";
import type { StackupEditor } from "./use-stackup-editor";
import { useStackupFields } from "./stackup-fields";
import { useStackupUnits } from "./stackup-units";

interface Props {
  editor: StackupEditor;
  warnings: readonly StackupWarning[];
  /** Layer under the pointer in the drawing. */
  pointed: string | null;
  onPoint: (key: string | null) => void;
  onMoved: (message: string) => void;
  onRemove: (key: string) => void;
}

/** The ordered layers, top to bottom. Arrows go from row to row, Alt and an arrow moves the layer itself. */
export function LayerTable({ editor, warnings, pointed, onPoint, onMoved, onRemove }: Props) {
  const { layers } = editor.stackup;
  const body = useRef<HTMLTableSectionElement>(null);
  const { readOnly } = useStackupFields();
  const { reader } = useStackupUnits();
  const built = useMemo(() => {
    const { layers: docs } = documentOf(editor.stackup);
    return docs.map((_, index) => {
      const exact = builtThicknessExact(docs, index, reader);
      return exact && columnLength(exact, reader);
    });
  }, [editor.stackup, reader]);
  const fraction = Math.max(0, ...built.map((length) => fractionDigits(length?.text ?? "")));

  function onKeyDown(event: KeyboardEvent<HTMLTableRowElement>, layer: EditLayer, index: number): void {
    const step = event.key === "ArrowUp" ? -1 : event.key === "ArrowDown" ? 1 : 0;
    const target = event.target as HTMLElement;
    if (step !== 0 && event.altKey) {
      event.preventDefault();
      const to = index + step;
      if (readOnly || to < 0 || to >= layers.length) return;
      // What is half typed is read first: the field moves with its layer.
      const column = columnOf(target);
      target.blur();
      editor.changeLayers((present) => moveLayer(present, layer.key, step), layer.key);
      onMoved(`${layer.name} is now layer ${to + 1} of ${layers.length}.`);
      requestAnimationFrame(() => focusCell(body.current, layer.key, column));
    } else if (step !== 0 && target.tagName !== "SELECT" && !event.ctrlKey && !event.metaKey) {
      event.preventDefault();
      const next = layers[index + step];
      if (next) focusCell(body.current, next.key, columnOf(target));
    } else if (event.key === "Delete" && target === event.currentTarget && !readOnly) {
      event.preventDefault();
      const next = layers[index + 1] ?? layers[index - 1];
      onRemove(layer.key);
      if (next) requestAnimationFrame(() => focusCell(body.current, next.key, null));
    }
  }

  return (
    <div className="border-rule-line bg-sheet relative overflow-x-auto border-y">
      <table
        aria-label="Layers, top to bottom"
        className="w-full min-w-[620px] table-fixed border-separate border-spacing-0 text-sm"
      >
        <thead>
          <tr className="text-ink-soft h-8 text-left">
            <Head className="w-8 text-right">#</Head>
            <Head>Layer</Head>
            <Head className="w-[88px]">Kind</Head>
            <Head className="w-[104px] text-right" title="Dielectric and mask: thickness. Copper: base foil.">
              Typed
            </Head>
            <Head className="w-14 text-right">Dk</Head>
            <Head className="w-16 text-right">Df</Head>
            <Head className="w-[92px] text-right" title="Copper with its plating, prepreg as pressed.">
              As built
            </Head>
            <Head className="w-8">
              <span className="sr-only">Remarks</span>
            </Head>
          </tr>
        </thead>
        <tbody ref={body}>
          {layers.map((layer, index) => (
            <LayerRow
              key={layer.key}
              built={built[index] ?? null}
              fraction={fraction}
              editor={editor}
              layer={layer}
              index={index}
              warnings={warnings.filter((warning) => warning.layer === index)}
              pointed={pointed === layer.key}
              onPoint={onPoint}
              onKeyDown={(event) => onKeyDown(event, layer, index)}
            />
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Head({
  children,
  className,
  title,
}: {
  children: React.ReactNode;
  className?: string;
  title?: string;
}) {
  return (
    <th
      scope="col"
      title={title}
      className={cn("border-rule-line border-b px-2 text-xs font-normal", className)}
    >
      {children}
    </th>
  );
}

interface RowProps {
  /** null where an input of it is missing */
  built: { text: string; unit: string } | null;
  /** Digits after the point that the column reserves. */
  fraction: number;
  editor: StackupEditor;
  layer: EditLayer;
  index: number;
  warnings: readonly StackupWarning[];
  pointed: boolean;
  onPoint: (key: string | null) => void;
  onKeyDown: (event: KeyboardEvent<HTMLTableRowElement>) => void;
}

function LayerRow({
  built,
  fraction,
  editor,
  layer,
  index,
  warnings,
  pointed,
  onPoint,
  onKeyDown,
}: RowProps) {
  const { selected, changeLayer, select } = editor;
  const active = selected === layer.key;
  const copper = isCopper(layer);
  const pressed = layer.thicknessMode === "pressed";
  const issues = editor.issues.filter((issue) => issue.layerKey === layer.key);
  const tone = cn(active ? "bg-copper/10" : pointed && "bg-rule-line/40");
  const cell = cn("border-rule-line/60 border-b p-0", issues.length > 0 && "border-b-0");
  const common = { layer, onChange: changeLayer, inTable: true } as const;
  return (
    <>
      <tr
        data-layer={layer.key}
        aria-current={active ? "true" : undefined}
        tabIndex={active ? 0 : -1}
        aria-label={`${index + 1}, ${layer.name}`}
        onFocus={() => {
          if (!active) select(layer.key);
        }}
        onMouseEnter={() => onPoint(layer.key)}
        onMouseLeave={() => onPoint(null)}
        onClick={() => select(layer.key)}
        onKeyDown={onKeyDown}
        className={cn("h-8 -outline-offset-2", tone)}
      >
        <td
          className={cn(cell, "text-ink-soft px-2 text-right text-xs", active && "text-copper font-semibold")}
        >
          {index + 1}
        </td>
        <td className={cell} data-column="name">
          <div className="flex items-center">
            <span aria-hidden="true" className={cn("ml-1 h-4 w-1.5 shrink-0", SWATCH[layer.kind])} />
            <LayerText {...common} field="name" label="Name" />
          </div>
        </td>
        <td className={cell} data-column="kind">
          <KindSelect
            label={`Kind of ${layer.name}`}
            labelHidden
            kind={layer.kind}
            onChange={(kind: LayerKind) => changeLayer(layer.key, (present) => withKind(present, kind))}
          />
        </td>
        <td className={cell} data-column="thickness">
          {pressed ? (
            <span className="text-ink-soft block truncate px-2 text-right">
              {layer.plies.map((ply) => `${ply.count} × ${ply.style || "ply"}`).join(" + ") || "no plies"}
            </span>
          ) : (
            <LayerText
              {...common}
              field={copper ? "baseFoil" : "thickness"}
              label={copper ? "Base foil" : "Thickness"}
              alignRight
            />
          )}
        </td>
        <td className={cell} data-column="dk">
          {copper ? null : <LayerText {...common} field="dk" label="Dk" alignRight />}
        </td>
        <td className={cell} data-column="df">
          {copper ? null : <LayerText {...common} field="df" label="Df" alignRight />}
        </td>
        <td className={cn(cell, "px-2 text-right whitespace-nowrap")}>
          {built ? (
            <NumberText {...built} fraction={fraction} />
          ) : (
            <span className="text-ink-soft">no data</span>
          )}
        </td>
        <td className={cn(cell, "px-1 text-center")}>
          <Remarks warnings={warnings} />
        </td>
      </tr>
      {issues.length > 0 ? (
        <tr className={tone}>
          <td className="border-rule-line/60 border-b" />
          <td colSpan={7} className="text-fail border-rule-line/60 border-b px-2 pb-1 text-xs">
            {issues.map((issue) => (
              <p key={issue.message}>{issue.message}</p>
            ))}
          </td>
        </tr>
      ) : null}
    </>
  );
}

function Remarks({ warnings }: { warnings: readonly StackupWarning[] }) {
  const worst =
    warnings.find(({ severity }) => severity === "error") ??
    warnings.find(({ severity }) => severity === "warning");
  if (!worst) return null;
  const words = warnings.map(({ message }) => message).join(" ");
  return (
    <span title={words} className={worst.severity === "error" ? "text-fail" : "text-near"}>
      <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className="inline">
        <VerdictShape verdict={worst.severity === "error" ? "fail" : "near"} />
      </svg>
      <span className="sr-only">{words}</span>
    </span>
  );
}

const SWATCH: Record<LayerKind, string> = {
  mask: "bg-pass/50",
  foil: "bg-copper",
  signal: "bg-copper",
  plane: "bg-copper",
  core: "bg-rule-line",
  prepreg: "bg-rule-line/60",
};

function columnOf(target: Element): string | null {
  return target.closest("[data-column]")?.getAttribute("data-column") ?? null;
}

/** The field in the same column of another row; the row itself where that has none. */
function focusCell(body: HTMLElement | null, key: string, column: string | null): void {
  const row = [...(body?.querySelectorAll<HTMLElement>("[data-layer]") ?? [])].find(
    (candidate) => candidate.dataset.layer === key,
  );
  const field = column
    ? row?.querySelector<HTMLElement>(`[data-column="${column}"] :is(input, select)`)
    : null;
  (field ?? row)?.focus();
}
