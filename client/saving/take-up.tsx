import type { Revision } from "../../shared/contract/case.ts";
import { withAlternative } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { formOfSetting } from "../case/form-of-setting.ts";
import { same } from "../case/same.ts";

interface TakeUpProps {
  readonly page: CasePage;
  readonly revision: Revision;
  readonly onTaken: () => void;
}

/** Puts an old revision back on the page as the work in hand; it becomes a new revision when it is saved. */
export function TakeUp({ page, revision, onTaken }: TakeUpProps) {
  const { model } = page;
  const { content, number } = revision;
  const key = page.selected.value?.key ?? "";
  const sameSetting =
    same(page.settled.value.setting, content.setting) && page.settled.value.timeZone === content.timeZone;
  const takeUp = (part: "orders" | "everything") => {
    model.change(`revision ${number} taken up again`, (document) => {
      const withOrders = withAlternative(document, key, (each) => ({
        ...each,
        schedule: content.schedule,
        cautionReasons: content.cautionReasons,
      }));
      if (part === "orders") return withOrders;
      const { timeZone, setting } = content;
      return { ...withOrders, timeZone, form: formOfSetting(setting, timeZone) };
    });
    onTaken();
  };
  return (
    <span class="button-row">
      <button type="button" class="button" onClick={() => takeUp("orders")}>
        Take up {sameSetting ? "" : "its orders "}again<span class="unseen"> revision {number}</span>
      </button>
      {!sameSetting && (
        <button type="button" class="button" onClick={() => takeUp("everything")}>
          Take up with its kinetics and plan, for all alternatives<span class="unseen"> revision {number}</span>
        </button>
      )}
    </span>
  );
}
