import { createClient } from "@libsql/client";

/** Orders of the demonstration's builder. The one that is cut has drawings, a quote, pieces and a nest. */
const ORDERS = { cut: "Galley carcass, forward", shipped: "Fan panel, heads compartment" } as const;
export type DemoOrder = keyof typeof ORDERS;

/** Where an id in an address comes from, by its name in the URL map. */
const FOUND_BY: Readonly<Record<string, string>> = {
  ":orderId": "select id from orders where name = :order",
  ":drawingId":
    "select d.id from order_drawings d join orders o on o.id = d.order_id where o.name = :order limit 1",
  ":key":
    "select r.geometry_key as id from revisions r join orders o on o.revision_id = r.id where o.name = :order",
  ":sheetId":
    "select l.sheet_id as id from placements l join pieces p on p.id = l.piece_id join orders o on o.id = p.order_id where o.name = :order limit 1",
  ":nestId":
    "select s.nest_id as id from nest_sheets s join placements l on l.sheet_id = s.id join pieces p on p.id = l.piece_id join orders o on o.id = p.order_id where o.name = :order limit 1",
  ":parcelId": "select p.id from parcels p join orders o on o.id = p.order_id where o.name = :order limit 1",
  ":materialId": "select id from materials order by code limit 1",
  ":lotId": "select id from lots order by code limit 1",
};

/** Ids that stand in the database the product runs on, for the parameters of addresses; what an order has not is left out. */
export async function demoIds(order: DemoOrder): Promise<Readonly<Record<string, string>>> {
  const database = createClient({ url: process.env.KERFPOST_DATABASE_URL ?? "" });
  try {
    const ids: Record<string, string> = {};
    for (const [name, sql] of Object.entries(FOUND_BY)) {
      const args: Record<string, string> = sql.includes(":order") ? { order: ORDERS[order] } : {};
      const [row] = (await database.execute({ sql, args })).rows;
      if (row) ids[name] = String(row.id);
    }
    if (!ids[":orderId"]) throw new Error(`No order is called ${ORDERS[order]}.`);
    return ids;
  } finally {
    database.close();
  }
}
