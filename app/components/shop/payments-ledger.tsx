import { formatMoney } from "~/domain/units";
import type { StaffOrderView } from "~/routes/shop/order-view.server";
import { ActForm } from "../act-form";
import { ConfirmButton } from "../confirm-button";
import { DateTime } from "../date-time";
import { plainField } from "../field";
import { Money } from "../money";
import { RailSection } from "../rail";
import { TextField } from "../text-field";

const KIND_WORDS = {
  debt: "owed by the quote",
  payment: "paid",
  refund: "given back",
  "debt-released": "no longer owed",
  dispute: "disputed",
} as const;

/** Debts, payments and refunds in their order; for the owner, the way to give money back. */
export function PaymentsLedger({ order }: { readonly order: StaffOrderView }) {
  const { ledger, owed, payments, waitingRefunds } = order.money;
  return (
    <RailSection title="Payments" note={ledger.length === 0 ? undefined : owedWords(owed)} measured>
      {ledger.length === 0 && <p className="text-soft">No money has moved.</p>}
      <ul className="space-y-2">
        {ledger.map((entry) => (
          <li key={entry.id}>
            <p className="flex items-baseline justify-between gap-4">
              <span>{KIND_WORDS[entry.kind]}</span>
              <Money cents={entry.amount} currency={entry.currency} />
            </p>
            <p className="text-caption text-soft">
              <DateTime at={entry.at} show="day-time" />
              {entry.by && ` · ${entry.by}`}
              {entry.note && <span className="break-words"> · {entry.note}</span>}
            </p>
          </li>
        ))}
        {waitingRefunds.map((refund) => (
          <li key={refund.id} className="flex items-baseline justify-between gap-4 text-amber">
            <span>{refund.status === "failed" ? "refund failed" : "refund asked for"}</span>
            <Money cents={refund.amount} />
          </li>
        ))}
      </ul>
      {order.mayRefund &&
        payments
          .filter(({ left }) => left > 0)
          .map((payment) => (
            <RefundForm key={`${payment.checkoutId} ${payment.left}`} order={order} payment={payment} />
          ))}
    </RailSection>
  );
}

const owedWords = (owed: number): string =>
  owed > 0 ? `${formatMoney(owed)} still owed` : owed < 0 ? `${formatMoney(-owed)} too much paid` : "settled";

interface RefundFormProps {
  readonly order: StaffOrderView;
  readonly payment: StaffOrderView["money"]["payments"][number];
}

function RefundForm({ order, payment }: RefundFormProps) {
  const { checkoutId, left, currency } = payment;
  return (
    <div className="mt-3">
      <ActForm
        intent="refund"
        fields={{ key: checkoutId, checkoutId, refundId: order.refundId }}
        label="Refund"
      >
        {(pending) => (
          <ConfirmButton
            label="Refund"
            question={`It goes back to the card it came from. At most ${formatMoney(left, currency)} is left of this payment.`}
            confirm="Give it back"
            pending={pending}
          >
            <TextField
              field={plainField("amount", {
                id: "refund-amount",
                value: (left / 100).toFixed(2),
                required: true,
              })}
              label="Amount"
              hint={`The whole ${formatMoney(left, currency)}, or a part of it.`}
              inputMode="decimal"
              measured
              unit={currency.toUpperCase()}
            />
            <TextField
              field={plainField("reason", { id: "refund-reason", required: true })}
              label="Why; the builder is told"
              minLength={3}
              maxLength={500}
            />
          </ConfirmButton>
        )}
      </ActForm>
    </div>
  );
}
