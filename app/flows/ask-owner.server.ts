import type { Executor } from "~/db/client.server";
import { ownerAttentionMail } from "~/documents/mails/owner-attention";
import { recordAct } from "~/models/audit.server";
import type { Order } from "~/models/orders.server";
import { queueMail } from "~/models/outbox.server";
import { listAddresseesWithRole } from "~/models/people.server";
import { currentSettings } from "~/models/settings.server";
import { environment } from "~/server/environment.server";

export interface OwnerQuestion {
  readonly order: Pick<Order, "id" | "reference">;
  readonly act: string;
  readonly detail: Record<string, unknown>;
  readonly subject: string;
  readonly words: string;
}

/** Brings something that needs a decision before the owner: an audit entry that stays, and a mail to every owner. */
export async function askOwner(tx: Executor, question: OwnerQuestion): Promise<void> {
  const { order, act, detail, subject, words } = question;
  await recordAct(tx, {
    actorId: null,
    act,
    subject: { kind: "order", id: order.id },
    detail: { ...detail, words },
  });
  const { shop } = await currentSettings(tx);
  for (const owner of await listAddresseesWithRole(tx, "owner"))
    await queueMail(tx, {
      recipient: owner.email,
      template: "owner-attention",
      orderId: order.id,
      ...ownerAttentionMail({
        shopName: shop.name,
        name: owner.name,
        subject,
        words,
        url: `${environment.APP_URL}/shop/orders/${order.id}`,
      }),
    });
}
