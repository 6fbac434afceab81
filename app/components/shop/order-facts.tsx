import type { StaffOrderView } from "~/routes/shop/order-view.server";
import { DefinitionList } from "../definition-list";
import { Measure } from "../measure";
import { RailSection } from "../rail";
import { AddressLines } from "./address-lines";

/** Who it is for and where it goes. */
export function BuilderFacts({ order }: { readonly order: StaffOrderView }) {
  const { builder, delivery, shipTo } = order;
  return (
    <RailSection title="Builder" note={delivery === "pick-up" ? "picks it up" : undefined}>
      {builder && (
        <p>
          {builder.name}
          <br />
          <a href={`mailto:${builder.email}`} className="text-blue underline underline-offset-2 break-all">
            {builder.email}
          </a>
        </p>
      )}
      {delivery === "ship" && shipTo && (
        <div className="mt-2 border-t border-line pt-2">
          <AddressLines shipTo={shipTo} />
        </div>
      )}
    </RailSection>
  );
}

/** What it is cut from, with the lot on the rack. */
export function StockFacts({ stocks }: { readonly stocks: StaffOrderView["stocks"] }) {
  if (stocks.length === 0) return null;
  return (
    <RailSection title="Stock">
      <DefinitionList
        items={stocks.map((stock) => ({
          id: stock.id,
          term: stock.material,
          value: `${stock.sheets.toFixed(1)} sheets`,
          note: (
            <>
              {stock.lot ? `lot ${stock.lot}` : "no lot"}
              {stock.thickness && (
                <>
                  , measured <Measure length={stock.thickness.min} digits={2} bare /> to{" "}
                  <Measure length={stock.thickness.max} digits={2} />
                </>
              )}
              {stock.reserved && ", set aside"}
            </>
          ),
        }))}
      />
    </RailSection>
  );
}
