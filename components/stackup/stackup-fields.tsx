"use client";

import { createContext, type ReactNode, useContext, useId, useLayoutEffect, useRef, useState } from "react";
import { cn } from "@/components/ui/class-names";
import { controlClasses, describedBy, Field } from "@/components/ui/field";
import type { Refusals } from "./stackup-issues";

interface FieldsState {
  refusals: Refusals;
  refuse: (address: string, text: string, reason: string) => void;
  accept: (address: string) => void;
  readOnly: boolean;
}

const Context = createContext<FieldsState | null>(null);

/** Keeps every refused text, so that it survives when its field leaves the screen. */
export function StackupFields({ children, ...state }: FieldsState & { children: ReactNode }) {
  return <Context.Provider value={state}>{children}</Context.Provider>;
}

export function useStackupFields(): FieldsState {
  const state = useContext(Context);
  if (!state) throw new Error("A field of the stackup stands outside of its editor.");
  return state;
}

interface Props {
  /** `<layer key>.<field>` */
  address: string;
  label: string;
  labelHidden?: boolean;
  /** The value as it was typed, for whoever enters the field. */
  typed: string;
  /** The value as it is read. */
  shown: string;
  /** Reads the text and changes the document. @throws Error with the sentence to show */
  commit: (text: string) => void;
  hint?: ReactNode;
  suggestions?: readonly string[];
  alignRight?: boolean;
  /** In a table: no frame until one points at it, and the reason below the row instead of below the field. */
  inTable?: boolean;
  placeholder?: string;
  className?: string;
}

/** Text until the field is left or Enter is pressed; what cannot be read stays, with the reason. Esc gives it up. */
export function FieldText(props: Props) {
  const { address, label, typed, shown, commit, suggestions, inTable = false, hint } = props;
  const { refusals, refuse, accept, readOnly } = useStackupFields();
  const id = useId();
  const [text, setText] = useState<string | null>(null);
  const refusal = refusals[address];
  const error = refusal?.reason ?? null;

  function read(written: string): void {
    setText(null);
    if (written === typed) return accept(address);
    try {
      commit(written);
      accept(address);
    } catch (reason) {
      refuse(address, written, reason instanceof Error ? reason.message : "This cannot be read.");
    }
  }

  // Back and forward take the field off the screen without leaving it: what was typed is read all the same.
  const gone = useRef<() => void>(() => undefined);
  useLayoutEffect(() => {
    gone.current = () => {
      if (text !== null && !readOnly) read(text);
    };
  });
  useLayoutEffect(() => () => gone.current(), []);

  if (readOnly)
    return inTable ? (
      <span className={cn("block truncate px-2", props.alignRight && "text-right")}>{shown || "–"}</span>
    ) : (
      <div className={cn("flex min-w-0 flex-col gap-1 text-sm", props.className)}>
        <span className="font-medium">{label}</span>
        <span className="text-ink-soft">{shown || "not given"}</span>
      </div>
    );

  const input = (
    <input
      id={id}
      type="text"
      autoComplete="off"
      spellCheck={false}
      list={suggestions ? `${id}-list` : undefined}
      placeholder={props.placeholder}
      className={cn(
        controlClasses,
        props.alignRight && "text-right",
        inTable &&
          "hover:border-field-line focus:border-field-line focus:bg-sheet h-7 border-transparent bg-transparent",
      )}
      value={text ?? refusal?.text ?? shown}
      data-typing={text !== null && text !== typed ? "" : undefined}
      title={inTable && error ? error : undefined}
      onFocus={(event) => {
        setText(refusal?.text ?? typed);
        const entered = event.currentTarget;
        requestAnimationFrame(() => {
          if (document.activeElement === entered) entered.select();
        });
      }}
      onChange={(event) => setText(event.target.value)}
      onBlur={() => {
        // After Enter the field shows the value in the reader's unit: that is not what was typed.
        if (text !== null) read(text);
      }}
      onKeyDown={(event) => {
        if (event.key === "Enter" && text !== null) read(text);
        if (event.key === "Escape" && (text !== typed || refusal)) {
          event.preventDefault();
          event.stopPropagation();
          accept(address);
          setText(typed);
        }
      }}
      {...(inTable
        ? { "aria-label": label, "aria-invalid": error ? (true as const) : undefined }
        : describedBy(id, hint, error))}
    />
  );
  const list = suggestions ? (
    <datalist id={`${id}-list`}>
      {suggestions.map((suggestion) => (
        <option key={suggestion} value={suggestion} />
      ))}
    </datalist>
  ) : null;
  if (inTable)
    return (
      <>
        {input}
        {list}
      </>
    );
  return (
    <Field
      id={id}
      label={label}
      hint={hint}
      error={error}
      labelHidden={props.labelHidden}
      className={props.className}
    >
      {input}
      {list}
    </Field>
  );
}
