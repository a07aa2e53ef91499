import type { Route } from "next";
import Link from "next/link";
import { buttonClasses } from "@/components/ui/button";

interface Props {
  projectId: string;
  missing: readonly { input: string; detail: string }[];
  mayEdit: boolean;
}

interface WayOut {
  label: string;
  place: string;
}

/** Why a path is not simulated, and where to put what it lacks. */
export function NoData({ projectId, missing, mayEdit }: Props) {
  const ways = new Map(missing.flatMap(({ input }) => wayOut(input) ?? []).map((way) => [way.place, way]));
  return (
    <section aria-labelledby="no-data" className="border-field-line border border-dashed p-4">
      <h2 id="no-data" className="text-base font-semibold">
        No data: this path is not simulated
      </h2>
      <dl className="mt-2 flex flex-col gap-2 text-sm">
        {missing.map(({ input, detail }) => (
          <div key={`${input} ${detail}`}>
            <dt className="font-medium">Missing: {input}</dt>
            <dd className="text-ink-soft max-w-prose">{detail}</dd>
          </div>
        ))}
      </dl>
      <p className="text-ink-soft mt-3 max-w-prose text-sm">
        A path without data never passes.{" "}
        {mayEdit
          ? "Fill in what is missing in the draft, then run the check."
          : "A designer can fill it in; then the check is run again."}
      </p>
      {ways.size > 0 ? (
        <div className="mt-3 flex flex-wrap gap-2 print:hidden">
          {[...ways.values()].map(({ label, place }) => (
            <Link key={place} href={`/projects/${projectId}/${place}` as Route} className={buttonClasses({})}>
              {label}
            </Link>
          ))}
        </div>
      ) : null}
    </section>
  );
}

/** By the words in which a path names what it lacks. */
function wayOut(input: string): WayOut[] | null {
  if (/^(driver|receiver) model|^thresholds/.test(input))
    return [{ label: "Open classes and models", place: "classes" }];
  if (/drives$|driving pin|^receiver of/.test(input))
    return [{ label: "Say which pins drive", place: "nets/import" }];
  if (/^(rate|class) of/.test(input)) return [{ label: "Open classes and models", place: "classes" }];
  if (/^(layer|signal layer|stackup|impedance of)/.test(input))
    return [{ label: "Open the stackup", place: "stackup" }];
  if (/^(route|branch lengths|pin pairs|other net|value|voltage of|part)/.test(input))
    return [{ label: "Import routes and parts", place: "nets/import" }];
  return null;
}
