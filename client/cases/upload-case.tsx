import { useSignal } from "@preact/signals";
import type { Failure } from "../http/answer.ts";
import { goTo } from "../routes.ts";
import { FailureNote } from "../shell/failure-note.tsx";

/** Takes in a case from a JSON file that this program wrote, and goes to its page. */
export function UploadCase() {
  const failure = useSignal<Failure | undefined>(undefined);
  const busy = useSignal(false);
  const upload = async (file: File | undefined) => {
    if (file === undefined) return;
    busy.value = true;
    failure.value = await uploaded(file);
    busy.value = false;
  };
  return (
    <section class="part" aria-labelledby="upload-title">
      <h2 id="upload-title">Take in a case from a file</h2>
      <div class="field">
        <label for="case-file">Case file</label>
        <input
          type="file"
          id="case-file"
          accept="application/json,.json"
          aria-describedby="case-file-hint"
          disabled={busy.value}
          onChange={(event) => {
            const input = event.currentTarget;
            void upload(input.files?.[0]).then(() => {
              input.value = "";
            });
          }}
        />
        <p class="field-hint" id="case-file-hint">
          a JSON file downloaded from Ebbline; every revision in it is checked against its hash and computed again
        </p>
      </div>
      {failure.value && <FailureNote failure={failure.value} />}
    </section>
  );
}

async function uploaded(file: File): Promise<Failure | undefined> {
  const content = await readJson(file);
  if (!content.ok) return content.failure;
  const { uploadCase } = await import("../http/cases-api.ts");
  const answer = await uploadCase(content.value);
  if (!answer.ok) return answer.failure;
  goTo(`/cases/${answer.value.id}`);
  return undefined;
}

/** UTF-8 only: another encoding would turn letters into others without a word. */
async function readJson(file: File): Promise<{ ok: true; value: unknown } | { ok: false; failure: Failure }> {
  const refused = (detail: string) => ({
    ok: false as const,
    failure: { kind: "refused" as const, title: "The file was not taken in", detail, errors: [] },
  });
  try {
    const text = new TextDecoder("utf-8", { fatal: true }).decode(await file.arrayBuffer());
    return { ok: true, value: JSON.parse(text) };
  } catch (error) {
    if (error instanceof SyntaxError) return refused(`${file.name} must be a JSON file: ${error.message}`);
    if (error instanceof TypeError) return refused(`${file.name} must be encoded in UTF-8`);
    throw error;
  }
}
