import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import { standingCaution } from "../shared/cautions/standing.ts";
import type { OpenCase } from "./case/open-case.tsx";
import { CasesPage } from "./cases/cases-page.tsx";
import { followHere, route } from "./routes.ts";
import { PageFrame } from "./shell/page-frame.tsx";

/** The page the address asks for. */
export function App() {
  const here = route.value;
  if (here.page === "cases") return <CasesPage />;
  if (here.page === "case") return <CasePageLoader key={here.id} id={here.id} />;
  return (
    <PageFrame cautions={[standingCaution]}>
      <h1>There is no such page</h1>
      <p>
        <a href="/" onClick={followHere}>
          All cases
        </a>
      </p>
    </PageFrame>
  );
}

/** The page of a case is most of the program; the list of cases does not wait for it. */
function CasePageLoader({ id }: { id: string }) {
  const loaded = useSignal<typeof OpenCase | "failed" | undefined>(undefined);
  const load = async () => {
    loaded.value = undefined;
    try {
      loaded.value = (await import("./case/open-case.tsx")).OpenCase;
    } catch {
      // No answer, or a newer release that has other files.
      loaded.value = "failed";
    }
  };
  useEffect(() => void load(), []);
  const Loaded = loaded.value;
  if (Loaded !== undefined && Loaded !== "failed") return <Loaded id={id} />;
  return (
    <PageFrame cautions={[standingCaution]}>
      {Loaded === undefined ? (
        <p role="status">Loading the case …</p>
      ) : (
        <div role="alert">
          <p>The page of the case could not be fetched. Load this page again.</p>
          <button type="button" class="button" onClick={() => location.reload()}>
            Load again
          </button>
        </div>
      )}
    </PageFrame>
  );
}
