"use client";

import { useMemo } from "react";
import type { Engine } from "@/lib/client/engine";
import type { EngineJob, PathPicture } from "@/lib/client/engine-jobs";
import { useEngine } from "@/lib/client/use-engine";
import { SIDES, SPEEDS, type View } from "./net-state";
import type { ResolvedPath } from "@/lib/si/path/types";
import type { Corner, CornerName, PathResult } from "@/lib/si/rules/types";

interface Wanted {
  engine: Engine;
  path: ResolvedPath;
  /** with the changes on trial */
  changed: ResolvedPath;
  trying: boolean;
  view: View;
  blocked: boolean;
}

interface Pictures {
  picture: PathPicture | null;
  /** of the path as it is, while changes are on trial */
  before: PathPicture | null;
  /** the changed path, judged at every corner */
  after: PathResult | null;
  error: string | null;
}

/** The pictures of what is looked at, computed beside the page. */
export function usePictures({ engine, path, changed, trying, view, blocked }: Wanted): Pictures {
  const { driver, corner, edge } = view;
  const request = useMemo(
    () => ({ driverPin: driver, corner: cornerOf(corner), edge }),
    [driver, corner, edge],
  );
  type Picture = EngineJob & { kind: "picture" };
  const shown = useMemo(
    (): Picture | null => (blocked ? null : { kind: "picture", path: changed, request }),
    [blocked, changed, request],
  );
  const own = useMemo(
    (): Picture | null => (blocked || !trying ? null : { kind: "picture", path, request }),
    [blocked, trying, path, request],
  );
  const judged = useMemo(
    (): (EngineJob & { kind: "check" }) | null =>
      blocked || !trying ? null : { kind: "check", path: changed },
    [blocked, trying, changed],
  );
  const picture = useEngine(engine, shown);
  const before = useEngine(engine, own);
  const after = useEngine(engine, judged);
  return { picture: picture.answer, before: before.answer, after: after.answer, error: picture.error };
}

function cornerOf(name: CornerName): Corner {
  const [speed, side] = name.split("/");
  return {
    driver: SPEEDS.find((entry) => entry === speed) ?? "typical",
    impedance: SIDES.find((entry) => entry === side) ?? "nominal",
  };
}
