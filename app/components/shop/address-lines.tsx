import type { ShipTo } from "~/domain/orders";

/** A delivery address as it stands on a label. */
export function AddressLines({ shipTo }: { readonly shipTo: ShipTo }) {
  const { recipient, company, line1, line2, city, region, postcode, phone } = shipTo;
  return (
    <address className="not-italic">
      {[recipient, company, line1, line2, `${city} ${region} ${postcode}`, phone]
        .filter((line): line is string => Boolean(line))
        .map((line) => (
          <span key={line} className="block break-words">
            {line}
          </span>
        ))}
    </address>
  );
}
