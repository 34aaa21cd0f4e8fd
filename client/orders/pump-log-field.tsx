import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import { TextField } from "../controls/text-field.tsx";
import { loadPumpLogReader } from "./pump-log-reader.ts";

interface PumpLogFieldProps {
  readonly id: string;
  readonly text: string;
  readonly problem?: string | undefined;
  readonly onText: (text: string) => void;
}

/** A pump's log: typed, pasted from a table, or read from a CSV file. It is read when the order is applied. */
export function PumpLogField({ id, text, problem, onText }: PumpLogFieldProps) {
  const unread = useSignal<string | undefined>(undefined);
  useEffect(() => void loadPumpLogReader(), []);
  const take = async (file: File | undefined) => {
    if (file === undefined) return;
    const read = await readText(file);
    unread.value =
      read === undefined ? `${file.name} must be text encoded in UTF-8; save it anew as CSV in UTF-8` : undefined;
    if (read !== undefined) onText(read);
  };
  return (
    <div class="pump-log">
      <TextField
        id={id}
        label="Pump log"
        lines={8}
        text={text}
        onText={onText}
        problem={problem ?? unread.value}
        hint="a line for each change of rate: time, rate in mg per hour. Times are hours after the order's time, or dates and times such as 2026-03-29 08:00. A rate holds until the next line; the last rate is 0."
      />
      <div class="field">
        <label for={`${id}-file`}>Or read it from a CSV file</label>
        <input
          type="file"
          id={`${id}-file`}
          accept=".csv,.tsv,.txt,text/csv,text/plain"
          onChange={(event) => {
            const input = event.currentTarget;
            void take(input.files?.[0]).then(() => {
              input.value = "";
            });
          }}
        />
      </div>
    </div>
  );
}

async function readText(file: File): Promise<string | undefined> {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(await file.arrayBuffer());
  } catch {
    return undefined;
  }
}
