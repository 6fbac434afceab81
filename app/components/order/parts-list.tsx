import type { ReactNode } from "react";
import { CutLength, Size } from "../measure";
import { RailSection } from "../rail";
import { useShownUnit } from "../shown-unit";
import { Cell, HeadCell, RowButton, RowHead, Table, TableHead, TableRow } from "../table";
import type { ShownPart } from "./order-view";
import type { OrderFocus } from "./use-order-focus";

interface PartsListProps {
  readonly parts: readonly ShownPart[];
  readonly focus: OrderFocus;
  /** The stock, where there is one for all. */
  readonly note?: string | undefined;
  /** What can be said of the chosen part. */
  readonly children?: ReactNode;
}

/** Every kind of part with its size and count; a row and its part on the drawing light up together. */
export function PartsList({ parts, focus, note, children }: PartsListProps) {
  const unit = useShownUnit();
  return (
    <RailSection title="Parts" note={note} measured>
      <div className="max-h-[26rem] overflow-y-auto print:max-h-none">
        <Table caption="Parts of the order">
          <TableHead>
            <HeadCell>part</HeadCell>
            <HeadCell numeric>size, {unit}</HeadCell>
            <HeadCell numeric>cut, {unit === "mm" ? "m" : "ft"}</HeadCell>
            <HeadCell numeric>qty</HeadCell>
          </TableHead>
          <tbody>
            {parts.map((part) => {
              const selected = part.label === focus.selected;
              const press = () => focus.select(selected ? null : part.label);
              return (
                <TableRow
                  key={part.label}
                  selected={selected}
                  lit={part.label === focus.hovered}
                  onHover={(over) => focus.hover(over ? part.label : null)}
                  onSelect={press}
                >
                  <RowHead measured>
                    <RowButton
                      pressed={selected}
                      onPress={press}
                      onFocusChange={(focused) => focus.hover(focused ? part.label : null)}
                    >
                      {part.label}
                      {part.name !== part.letter && ` ${part.name}`}
                      {part.mirrorOf && <span className="text-soft"> mirrors {part.mirrorOf}</span>}
                    </RowButton>
                  </RowHead>
                  <Cell numeric>
                    <Size width={part.width} height={part.height} bare />
                  </Cell>
                  <Cell numeric>
                    <CutLength length={part.cutLength} bare />
                  </Cell>
                  <Cell numeric>{part.quantity}</Cell>
                </TableRow>
              );
            })}
          </tbody>
        </Table>
      </div>
      {children}
    </RailSection>
  );
}
