import { standingCaution } from "../shared/cautions/standing.ts";
import { OpenCase } from "./case/open-case.tsx";
import { CasesPage } from "./cases/cases-page.tsx";
import { followHere, route } from "./routes.ts";
import { PageFrame } from "./shell/page-frame.tsx";

/** The page the address asks for. */
export function App() {
  const here = route.value;
  if (here.page === "cases") return <CasesPage />;
  if (here.page === "case") return <OpenCase key={here.id} id={here.id} />;
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
