"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { parseAsString, parseAsStringLiteral, useQueryStates } from "nuqs";
import { useCallback, useMemo, useRef, useState } from "react";
import { useLengthUnit } from "@/components/shell/length-unit";
import { StackupUnits } from "@/components/stackup/stackup-units";
import { PageHeader } from "@/components/ui/page-header";
import { Tabs } from "@/components/ui/tabs";
import { toast } from "@/components/ui/toast";
import { UndoButtons } from "@/components/undo/undo-buttons";
import { useUndo } from "@/components/undo/use-undo";
import {
  type BindingList,
  bindingMatchesKey,
  bindingsKey,
  bindingsQuery,
  modelsKey,
  modelsQuery,
} from "@/lib/client/models";
import { netClassesKey, netClassRowsQuery, type NetClassRow } from "@/lib/client/net-classes";
import type { LengthUnit } from "@/lib/client/preferences";
import type { StoredModel } from "@/lib/schemas/model";
import type { StoredRuleSet } from "@/lib/schemas/rule-set";
import { BindingsTab } from "./bindings-tab";
import type { SignalLayer } from "./class-words";
import { type ClassesDesk, ClassesDeskProvider } from "./classes-desk";
import { ClassesTab } from "./classes-tab";
import { ModelsTab } from "./models-tab";

export interface ClassesViewProps {
  projectId: string;
  /** Letter of the revision looked at. */
  revision: string;
  search: string;
  /** the project's */
  unit: LengthUnit;
  layers: readonly SignalLayer[];
  ruleSet: StoredRuleSet;
  classes: NetClassRow[];
  models: StoredModel[];
  bindings: BindingList;
  /** Why classes, models and bindings are only shown; null where they are edited. */
  readOnly: string | null;
  /** Why limits are only shown; null where they are set. */
  limitsReadOnly: string | null;
}

const TABS = ["classes", "models", "bindings"] as const;

/** Classes of nets, the models of their pins, and which pin has which model. */
export function ClassesView(props: ClassesViewProps) {
  const { projectId, revision, readOnly, limitsReadOnly, layers, ruleSet, search } = props;
  const client = useQueryClient();
  const { unit: reader } = useLengthUnit();
  const [{ tab }, setState] = useQueryStates(
    { tab: parseAsStringLiteral(TABS).withDefault("classes"), at: parseAsString },
    { history: "replace" },
  );
  const { data: classes } = useQuery({
    ...netClassRowsQuery(projectId, revision),
    initialData: props.classes,
  });
  const { data: models } = useQuery({ ...modelsQuery(projectId, revision), initialData: props.models });
  const { data: bindings } = useQuery({ ...bindingsQuery(projectId, revision), initialData: props.bindings });
  const [epoch, setEpoch] = useState(0);
  const flush = useRef<(() => Promise<boolean>) | null>(null);
  const setFlush = useCallback((next: (() => Promise<boolean>) | null) => {
    flush.current = next;
  }, []);
  const [unsaved, setUnsaved] = useState(false);

  const editable = readOnly === null || limitsReadOnly === null;
  const undo = useUndo({
    projectId,
    enabled: editable,
    flush: async () => (await flush.current?.()) ?? true,
    reload: async () => {
      await Promise.all(
        [
          netClassesKey(projectId, revision),
          modelsKey(projectId, revision),
          bindingsKey(projectId, revision),
        ].map((queryKey) => client.invalidateQueries({ queryKey })),
      );
      void client.invalidateQueries({ queryKey: bindingMatchesKey(projectId) });
      setEpoch((present) => present + 1);
    },
  });
  const { undo: takeBack } = undo;

  const leave = useCallback((act: () => void) => {
    if (!flush.current) return act();
    void flush.current().then((saved) => {
      if (saved) act();
      else
        toast.error("What is open is not saved yet. Mend it, or give it up with Esc, before you leave it.");
    });
  }, []);

  const desk = useMemo<ClassesDesk>(
    () => ({
      projectId,
      revision,
      search,
      mayEdit: readOnly === null,
      mayLimit: limitsReadOnly === null,
      limitsWhy: limitsReadOnly ?? "",
      layers,
      ruleSet,
      models,
      epoch,
      leave,
      setFlush,
      setUnsaved,
      undo: takeBack,
    }),
    [
      projectId,
      revision,
      search,
      readOnly,
      limitsReadOnly,
      layers,
      ruleSet,
      models,
      epoch,
      leave,
      setFlush,
      takeBack,
    ],
  );

  const show = (next: string) => {
    const wanted = TABS.find((value) => value === next);
    if (wanted && wanted !== tab) leave(() => void setState({ tab: wanted, at: null }));
  };

  return (
    <StackupUnits project={props.unit}>
      <ClassesDeskProvider desk={desk}>
        <PageHeader
          title="Classes"
          description={
            readOnly ??
            `What a net must be: target, layers, driver, edge and end. Lengths without a unit are read as ${reader}, the unit they are shown in.`
          }
          actions={editable ? <UndoButtons undo={undo} unsaved={unsaved} /> : null}
        />
        <Tabs
          label="Classes, models and bindings"
          value={tab}
          onValueChange={show}
          tabs={[
            {
              value: "classes",
              label: `Classes ${classes.length}`,
              content: <ClassesTab classes={classes} />,
            },
            {
              value: "models",
              label: `Models ${models.length}`,
              content: <ModelsTab classes={classes} bindings={bindings.bindings} />,
            },
            {
              value: "bindings",
              label: `Bindings ${bindings.bindings.length}`,
              content: <BindingsTab key={epoch} stored={bindings} />,
            },
          ]}
        />
      </ClassesDeskProvider>
    </StackupUnits>
  );
}
