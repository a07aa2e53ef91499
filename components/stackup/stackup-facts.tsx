"use client";

import type { ReactNode } from "react";
import { NumberText } from "@/components/ui/number-text";
import { isCopper, isSignal, totalThickness } from "@/lib/si/stackup";
import { Decimal, type Quantity } from "@/lib/si/units";
import { type EditStackup, documentOf } from "./edit-layer";
import { useStackupUnits } from "./stackup-units";

/** Exact total thickness with and without mask, and how many layers of which kind. */
export function StackupFacts({ stackup }: { stackup: EditStackup }) {
  const { reader } = useStackupUnits();
  const { total, withoutMask, missing } = totalThickness(documentOf(stackup).layers, reader);
  const copper = stackup.layers.filter(isCopper);
  return (
    <dl className="border-rule-line mb-2 flex flex-wrap gap-x-8 gap-y-2 border-y py-2 text-sm">
      <Fact name="Over copper">
        <Exact quantity={withoutMask} />
      </Fact>
      <Fact name="Over mask">
        <Exact quantity={total} />
      </Fact>
      <Fact name="Copper layers">
        {copper.length}
        <span className="text-ink-soft"> ({copper.filter(isSignal).length} signal)</span>
      </Fact>
      {missing.length > 0 ? (
        <Fact name="Counted as nothing">
          <span className="text-fail">{missing.join(", ")}: an input is missing</span>
        </Fact>
      ) : null}
    </dl>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div>
      <dt className="text-ink-soft text-xs">{name}</dt>
      <dd className="font-medium">{children}</dd>
    </div>
  );
}

function Exact({ quantity }: { quantity: Quantity }) {
  const long = (quantity.value.split(".")[1]?.length ?? 0) > 5;
  const short = long ? new Decimal(quantity.value).toDecimalPlaces(4).toString() : quantity.value;
  return (
    <span title={long ? `${quantity.value} ${quantity.unit}` : undefined}>
      <NumberText text={short} unit={quantity.unit} />
    </span>
  );
}
