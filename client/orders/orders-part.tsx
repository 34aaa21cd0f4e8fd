import { counts } from "../../shared/contract/limits.ts";
import { sayOrder } from "../../shared/schedule/say-order.ts";
import { letterOf, withSchedule } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { momentFields } from "../case/drafts.ts";
import { newId } from "../case/new-id.ts";
import { sayPath } from "../case/say-refusal.ts";
import { refusedAt } from "../saving/refused.ts";
import { focusOn } from "../shell/focus.ts";
import { ExceptionsList } from "./exceptions-list.tsx";
import { draftOfOrder, emptyOrderDraft } from "./order-draft.ts";
import { OrderEditor } from "./order-editor.tsx";
import { withException, withOrder, withoutOrder } from "./order-edits.ts";
import "../setting/entries.css";
import "./orders-part.css";

/** The orders of the alternative being edited: read as sentences, edited in place. */
export function OrdersPart({ page }: { page: CasePage }) {
  const { model, drafts } = page;
  const document = page.settled.value;
  const selected = page.selected.value;
  if (selected === undefined) return null;
  const { timeZone } = document;
  const letter = letterOf(document, selected.key);
  const { orders } = selected.schedule;
  const draftName = (id: string) => `order:${selected.key}:${id}`;
  const problem = page.judged.value.problem;
  const editor = (id: string, title: string, known: (typeof orders)[number] | undefined) => {
    const draft = drafts.all.value[draftName(id)];
    if (draft === undefined) return null;
    const backTo = known ? `order-edit-${id}` : "order-add";
    return (
      <OrderEditor
        id={id}
        title={title}
        draft={draft}
        kept={known ?? { id: "new", exceptions: [] }}
        timeZone={timeZone}
        onDraft={(fields) => drafts.set(draftName(id), fields)}
        onApply={(order) => {
          drafts.close(draftName(id));
          const applied = known ? order : { ...order, id: newId() };
          const what = known ? `order of alternative ${letter} changed` : `order added to alternative ${letter}`;
          model.change(what, (now) => withSchedule(now, selected.key, (schedule) => withOrder(schedule, applied)));
          focusOn(backTo, "orders-title");
        }}
        onCancel={() => {
          drafts.close(draftName(id));
          focusOn(backTo, "orders-title");
        }}
      />
    );
  };
  return (
    <section class="part" aria-labelledby="orders-title">
      <h2 id="orders-title">Orders of alternative {letter}</h2>
      {problem && (
        <p class="field-problem" role="alert">
          <span class="mark">This alternative cannot be computed:</span> {sayPath(problem.field)} {problem.detail}
        </p>
      )}
      {orders.length === 0 && <p class="soft">Nothing is ordered yet. A loading dose is an order given once.</p>}
      <ol class="entries">
        {orders.map((order, index) => (
          <li key={order.id} id={`order-${index}`} tabIndex={-1}>
            <div class="entry">
              <div>
                <p>
                  <strong>Order {index + 1}:</strong> {sayOrder(order, timeZone)}
                </p>
                {order.note && <p class="soft">{order.note}</p>}
                {refusedAt(page, `order-${index}`) && <p class="field-problem">{refusedAt(page, `order-${index}`)}</p>}
              </div>
              <div class="button-row">
                <button
                  type="button"
                  class="button"
                  id={`order-edit-${order.id}`}
                  onClick={() => {
                    drafts.open(draftName(order.id), draftOfOrder(order, timeZone));
                    focusOn(`order-${order.id}-${order.give.kind === "pump" ? "pump" : "amount"}`);
                  }}
                >
                  Edit<span class="unseen"> order {index + 1}</span>
                </button>
                <button
                  type="button"
                  class="button"
                  onClick={() => {
                    drafts.close(draftName(order.id));
                    model.change(`order ${index + 1} of alternative ${letter} deleted`, (now) =>
                      withSchedule(now, selected.key, (schedule) => withoutOrder(schedule, order.id)),
                    );
                    focusOn("order-add", "orders-title");
                  }}
                >
                  Delete<span class="unseen"> order {index + 1}</span>
                </button>
              </div>
            </div>
            <ExceptionsList
              order={order}
              timeZone={timeZone}
              onPutBack={(occurrence) => {
                model.change(`dose ${occurrence + 1} of order ${index + 1} as the rest`, (now) =>
                  withSchedule(now, selected.key, (schedule) =>
                    withException(schedule, order.id, occurrence, undefined),
                  ),
                );
                focusOn(`order-edit-${order.id}`);
              }}
            />
            {editor(order.id, `Order ${index + 1}`, order)}
          </li>
        ))}
      </ol>
      {editor("new", "New order", undefined)}
      {drafts.all.value[draftName("new")] === undefined && (
        <button
          type="button"
          class="button button-main"
          id="order-add"
          disabled={orders.length >= counts.ordersPerAlternative}
          onClick={() => {
            drafts.open(draftName("new"), {
              ...emptyOrderDraft,
              ...momentFields("at", model.document.peek().form.start),
            });
            focusOn("order-new-amount");
          }}
        >
          Add an order
        </button>
      )}
    </section>
  );
}
