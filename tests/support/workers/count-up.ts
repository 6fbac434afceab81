/** A process that raises the order number as often as its argument says, each time in a transaction of its own. */
import { closeDatabase, transact } from "~/db/client.server";
import { createDraftOrder } from "~/models/draft-orders.server";

const [times, builderId] = process.argv.slice(2);
await Promise.all(
  Array.from({ length: Number(times) }, (_, n) =>
    transact((tx) =>
      createDraftOrder(tx, { builderId: builderId ?? "", name: `Order ${n} of ${process.pid}` }),
    ),
  ),
);
closeDatabase();
