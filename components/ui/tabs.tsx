"use client";

import { Tabs as Radix } from "radix-ui";
import type { ReactNode } from "react";

export interface Tab {
  value: string;
  label: ReactNode;
  content: ReactNode;
}

interface Props {
  /** What the tabs choose between, for those who do not see it. */
  label: string;
  tabs: readonly Tab[];
  value?: string;
  defaultValue?: string;
  onValueChange?: (value: string) => void;
}

/** Views of one thing, side by side; arrows move between them. */
export function Tabs({ label, tabs, value, defaultValue = tabs[0]?.value, onValueChange }: Props) {
  return (
    <Radix.Root
      value={value}
      defaultValue={value === undefined ? defaultValue : undefined}
      onValueChange={onValueChange}
    >
      <Radix.List aria-label={label} className="border-rule-line flex gap-1 overflow-x-auto border-b">
        {tabs.map((tab) => (
          <Radix.Trigger
            key={tab.value}
            value={tab.value}
            className="text-ink-soft hover:text-ink data-[state=active]:border-copper data-[state=active]:text-ink -mb-px h-8 border-b-2 border-transparent px-3 text-sm whitespace-nowrap -outline-offset-2 data-[state=active]:font-medium"
          >
            {tab.label}
          </Radix.Trigger>
        ))}
      </Radix.List>
      {tabs.map((tab) => (
        <Radix.Content key={tab.value} value={tab.value} className="pt-4">
          {tab.content}
        </Radix.Content>
      ))}
    </Radix.Root>
  );
}
