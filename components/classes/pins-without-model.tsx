"use client";

import type { Route } from "next";
import Link from "next/link";
import type { BindingMatches, PinWithoutModel } from "@/lib/schemas/binding-matches";
import { counted } from "./class-words";

interface Props {
  matches: BindingMatches | null;
  projectId: string;
  search: string;
}

const NEEDS: Record<PinWithoutModel["needs"], string> = {
  driver: "a driver model",
  receiver: "a receiver model",
  role: "a role: no row fits",
};

/** Parts whose pins drive or receive without a model, those with most pins first. */
export function PinsWithoutModel({ matches, projectId, search }: Props) {
  if (!matches) return null;
  if (matches.pins === 0)
    return (
      <p className="text-ink-soft text-sm">
        No routed nets yet, so no pin to bind.{" "}
        <Link className="prose-link" href={`/projects/${projectId}/nets${search}` as Route}>
          Import a list of nets
        </Link>
      </p>
    );
  const { withoutModel, pinsWithoutModel } = matches;
  return (
    <section aria-labelledby="pins-without-model">
      <h2 id="pins-without-model" className="text-base font-semibold">
        Pins without a model
      </h2>
      {withoutModel.length === 0 ? (
        <p className="text-ink-soft mt-1 text-sm">
          Every pin in scope has what it needs, of {counted(matches.pins, "pin")} on this board.
        </p>
      ) : (
        <>
          <p className="text-ink-soft mt-1 max-w-prose text-sm">
            {counted(pinsWithoutModel, "pin")} of nets in scope, in {counted(withoutModel.length, "group")}.
            Their paths are no data until a row above or their class gives what is missing.
          </p>
          <div
            className="border-rule-line bg-sheet mt-2 max-h-80 overflow-auto border-y"
            tabIndex={0}
            role="region"
            aria-label="Pins without a model"
          >
            <table aria-label="Pins without a model" className="w-full min-w-[560px] text-left text-sm">
              <thead>
                <tr className="text-ink-soft h-8">
                  <th className="px-2 font-medium">Part</th>
                  <th className="px-2 font-medium">Part number</th>
                  <th className="px-2 font-medium">Needs</th>
                  <th className="px-2 text-right font-medium">Pins</th>
                  <th className="px-2 font-medium">Such as</th>
                </tr>
              </thead>
              <tbody>
                {withoutModel.map((group) => (
                  <tr key={`${group.reference} ${group.needs}`} className="border-rule-line/60 h-8 border-t">
                    <td className="px-2 font-mono text-xs">{group.reference}</td>
                    <td className="px-2 font-mono text-xs">{group.partNumber || "–"}</td>
                    <td className="px-2">{NEEDS[group.needs]}</td>
                    <td className="px-2 text-right">{group.pins.toLocaleString("en")}</td>
                    <td className="text-ink-soft truncate px-2 font-mono text-xs">
                      {group.examples.join(", ")}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        </>
      )}
    </section>
  );
}
