"use client";

import { Check } from "lucide-react";
import { DropdownMenu as Radix } from "radix-ui";
import type { ReactNode } from "react";

const ITEM =
  "flex min-h-8 items-center gap-2 rounded px-2 text-sm outline-none select-none data-[disabled]:opacity-50 data-[highlighted]:bg-rule-line/60";

interface MenuProps {
  /** A single button. */
  trigger: ReactNode;
  children: ReactNode;
  align?: "start" | "end";
}

/** A list of acts that opens from a button. */
export function Menu({ trigger, children, align = "start" }: MenuProps) {
  return (
    <Radix.Root modal={false}>
      <Radix.Trigger asChild>{trigger}</Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          align={align}
          sideOffset={4}
          collisionPadding={8}
          className="border-field-line bg-sheet text-ink z-50 max-h-(--radix-dropdown-menu-content-available-height) max-w-(--radix-dropdown-menu-content-available-width) min-w-44 overflow-y-auto rounded border p-1"
        >
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

interface ItemProps {
  children: ReactNode;
  onSelect?: () => void;
  disabled?: boolean;
  danger?: boolean;
  /** Renders the one child (a link) as the item itself. */
  asChild?: boolean;
}

export function MenuItem({ children, onSelect, disabled, danger = false, asChild }: ItemProps) {
  return (
    <Radix.Item
      asChild={asChild}
      disabled={disabled}
      onSelect={onSelect}
      className={`${ITEM} ${danger ? "text-fail" : ""}`}
    >
      {children}
    </Radix.Item>
  );
}

interface ChoiceProps {
  label: string;
  value: string;
  options: readonly { value: string; label: ReactNode }[];
  onValueChange: (value: string) => void;
}

/** One of several, within a menu. */
export function MenuChoice({ label, value, options, onValueChange }: ChoiceProps) {
  return (
    <Radix.RadioGroup value={value} onValueChange={onValueChange}>
      <Radix.Label className="text-ink-soft px-2 pt-1 text-xs">{label}</Radix.Label>
      {options.map((option) => (
        <Radix.RadioItem key={option.value} value={option.value} className={ITEM}>
          <span className="grid size-4 place-items-center" aria-hidden="true">
            <Radix.ItemIndicator>
              <Check size={14} />
            </Radix.ItemIndicator>
          </span>
          {option.label}
        </Radix.RadioItem>
      ))}
    </Radix.RadioGroup>
  );
}

export function MenuSeparator() {
  return <Radix.Separator className="border-rule-line my-1 border-t" />;
}
