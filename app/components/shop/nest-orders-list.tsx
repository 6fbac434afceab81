import { Link } from "react-router";
import { DateTime } from "../date-time";
import { RailSection } from "../rail";
import { OrderSwatch } from "../sheet-viewer/sheet-viewer";

interface NestOrdersListProps {
  readonly orders: readonly {
    readonly id: string;
    readonly reference: string;
    readonly name: string;
    readonly promisedFor: string | null;
    readonly pieces: number;
    readonly sheets: readonly number[];
  }[];
}

/** Whose parts lie on a nest, on which sheets, and the days they are promised for. */
export function NestOrdersList({ orders }: NestOrdersListProps) {
  return (
    <RailSection title="What this nest does" note="to the dates">
      <ul className="divide-y divide-dashed divide-line">
        {orders.map((order, index) => (
          <li key={order.id} className="flex items-start gap-3 py-2 first:pt-0 last:pb-0">
            <OrderSwatch order={index} />
            <div className="min-w-0 flex-1">
              <p className="flex items-baseline justify-between gap-3">
                <Link
                  to={`/shop/orders/${order.id}`}
                  className="min-w-0 break-words text-blue underline underline-offset-2"
                >
                  {order.reference} {order.name}
                </Link>
                {order.promisedFor && <DateTime at={order.promisedFor} />}
              </p>
              <p className="text-caption text-soft">
                {order.pieces} {order.pieces === 1 ? "piece" : "pieces"} on{" "}
                {order.sheets.length === 1 ? "sheet" : "sheets"} {order.sheets.join(", ")}
              </p>
            </div>
          </li>
        ))}
      </ul>
    </RailSection>
  );
}
