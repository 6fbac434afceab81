import { Form } from "react-router";
import type { NestPool } from "~/routes/shop/nest-view.server";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { DateTime } from "../date-time";
import { plainField } from "../field";
import { Measure, Size } from "../measure";
import { Rail, RailSection } from "../rail";
import { Silhouette } from "../silhouette";

interface NestPoolRailProps {
  readonly pool: NestPool;
  /** The stock and the orders that are laid out now. */
  readonly stock: string | null;
  readonly chosen: readonly string[];
}

/** Pieces that wait for a nest: by stock, under each its orders to choose from. */
export function NestPoolRail({ pool, stock, chosen }: NestPoolRailProps) {
  return (
    <Rail label="Waiting for a nest">
      {pool.length === 0 && (
        <RailSection title="Waiting" note="0" measured>
          <p className="text-soft">No received piece waits. Orders come here when they are received.</p>
        </RailSection>
      )}
      {pool.map((group) => (
        <RailSection key={group.key} title={group.name} note={`${group.pieces}`} measured>
          <p className="measure -mt-1 mb-2 text-caption text-soft">
            {group.lot ? `lot ${group.lot} · ` : ""}
            {group.thickness && (
              <>
                <Measure length={group.thickness.min} digits={2} bare />–
                <Measure length={group.thickness.max} digits={2} bare /> ·{" "}
              </>
            )}
            <Size width={group.sheet.length} height={group.sheet.width} bare />
          </p>
          <Form method="get" aria-label={`Lay out ${group.name}`}>
            <input type="hidden" name="stock" value={group.key} />
            <ul className="divide-y divide-dashed divide-line">
              {group.orders.map((order) => (
                <li key={order.id} className="flex items-center gap-3 py-1.5">
                  <div className="min-w-0 flex-1">
                    <CheckboxField
                      field={plainField("order", {
                        id: `${group.key}-${order.id}`,
                        value: group.key !== stock || chosen.includes(order.id) ? order.id : "",
                      })}
                      value={order.id}
                      label={
                        <>
                          <span className="measure">{order.reference}</span> ×{order.pieces}
                          <span className="block text-caption text-soft">
                            {order.remakes > 0 && (
                              <span className="text-amber">
                                {order.remakes === order.pieces ? "remake" : `${order.remakes} remakes`} first
                                ·{" "}
                              </span>
                            )}
                            {order.promisedFor && <DateTime at={order.promisedFor} />}
                          </span>
                        </>
                      }
                    />
                  </div>
                  <Silhouette shape={order.shape} width={56} height={36} />
                </li>
              ))}
            </ul>
            <div className="mt-2">
              <Button variant={group.key === stock ? "plain" : "chosen"} size="small" wide>
                {group.key === stock ? "Lay out again" : "Lay out on sheets"}
              </Button>
            </div>
          </Form>
        </RailSection>
      ))}
    </Rail>
  );
}
