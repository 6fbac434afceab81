import { renderToString } from "react-dom/server";
import { createMemoryRouter, RouterProvider } from "react-router";
import { describe, expect, it } from "vitest";
import { AppShell } from "~/components/app-shell";
import { ConfirmButton } from "~/components/confirm-button";
import { DrawingViewer } from "~/components/drawing-viewer/drawing-viewer";
import type { ViewGeometry } from "~/components/drawing-viewer/view-geometry";
import { ErrorPanel } from "~/components/error-panel";
import { plainField } from "~/components/field";
import { Measure } from "~/components/measure";
import { Money } from "~/components/money";
import { RuleProgress } from "~/components/rule-progress";
import { ShownUnitProvider } from "~/components/shown-unit";
import { SteelRule } from "~/components/steel-rule";
import { TextField } from "~/components/text-field";

function html(element: React.ReactNode): string {
  const router = createMemoryRouter([{ path: "*", element }]);
  return renderToString(<RouterProvider router={router} />);
}

/** Words as a reader sees them: tags taken out. */
const words = (element: React.ReactNode): string => html(element).replace(/<[^>]*>/g, "");

const STAGES = ["received", "nested", "cut", "tabs-removed", "shipped"].map((name) => ({ name }));
const GEOMETRY: ViewGeometry = {
  parts: [
    {
      id: "A",
      name: "side",
      quantity: 1,
      size: { width: 420, height: 620 },
      outlines: [{ kind: "outside", d: "M0 0L420 0L420 620L0 620Z" }],
      words: [],
      circles: [],
      copies: [{ label: "A", labelAt: [0, 620], box: { minX: 0, minY: 0, maxX: 420, maxY: 620 } }],
      box: { minX: 0, minY: 0, maxX: 420, maxY: 620 },
    },
  ],
  open: { d: "", ends: [] },
  setAside: [],
  extents: { minX: 0, minY: 0, maxX: 420, maxY: 620 },
  fullExtents: { minX: 0, minY: 0, maxX: 420, maxY: 620 },
  snaps: [0, 0, 420, 0],
  totals: { parts: 1, kinds: 1, cutLength: 2080 },
};

describe("what the server sends", () => {
  it("carries no style attribute, which the production policy would refuse", () => {
    const page = html(
      <AppShell nav={[{ to: "/orders", label: "Orders" }]} who={{ name: "Wren", role: "builder" }}>
        <SteelRule stages={STAGES} at={2} />
        <SteelRule stages={STAGES} at={2} size="row" late />
        <RuleProgress label="Sending" share={0.4} />
        <TextField
          field={plainField("email", { errors: ["Give an address."] })}
          label="E-mail"
          hint="For receipts"
        />
        <ConfirmButton label="Refund" question="Sure?" confirm="Refund all" />
        <DrawingViewer geometry={GEOMETRY} selected="A" onSelect={() => undefined} />
      </AppShell>,
    );
    expect(page).not.toMatch(/\sstyle=/);
    expect(page).toContain("Part A, side, one, 420.0 by 620.0 mm");
  });

  it("ties a field to its error and its hint", () => {
    const page = html(
      <TextField field={plainField("qty", { errors: ["Give a number."] })} label="How many" hint="1 to 9" />,
    );
    expect(page).toContain('aria-describedby="qty-error qty-hint"');
    expect(page).toContain('aria-invalid="true"');
    expect(page).toMatch(/id="qty-error"[^>]*>Give a number\./);
  });
});

describe("the steel rule", () => {
  it("says its stage in words", () => {
    const page = html(<SteelRule stages={STAGES} at={1.6} late />);
    expect(page).toContain("Stage nested, 2 of 5, late");
  });

  it("travels in proportion: two of four intervals is half the rule", () => {
    expect(html(<SteelRule stages={STAGES} at={2} size="mini" />)).toMatch(/<rect[^>]*width="50%"/);
  });

  it("is a progress bar that tells its share", () => {
    const page = html(<RuleProgress label="Sending galley.dxf" share={0.427} />);
    expect(page).toContain('aria-valuenow="43"');
    expect(page).toMatch(/<rect[^>]*width="42.7%"/);
  });
});

describe("measures and money", () => {
  it("give inches with the nearest sixty-fourth", () => {
    const page = words(
      <ShownUnitProvider unit="in">
        <Measure length={420} />
      </ShownUnitProvider>,
    );
    expect(page).toBe("16.535\u2009in 16 17/32");
  });

  it("give cents as money, bare in a line", () => {
    expect(words(<Money cents={124_455} />)).toBe("$1,244.55");
    expect(words(<Money cents={-1800} show="line" />)).toBe("−18.00");
  });
});

describe("the error panel", () => {
  it("never shows what an inner error said", () => {
    const page = words(<ErrorPanel error={new Error("SQLITE_CONSTRAINT at /srv/app")} />);
    expect(page).toContain("This one is our fault");
    expect(page).not.toMatch(/SQLITE|srv/);
  });

  it("shows a sentence meant for the reader, and the status's own words otherwise", () => {
    const thrown = (status: number, data: unknown) => ({ status, statusText: "", internal: false, data });
    expect(words(<ErrorPanel error={thrown(409, { words: "Order is paid already." })} />)).toContain(
      "Order is paid already.",
    );
    expect(words(<ErrorPanel error={thrown(404, "Error: No route matches URL")} />)).toContain(
      "Nothing stands here",
    );
    expect(words(<ErrorPanel error={thrown(500, { words: "inner" })} />)).not.toContain("inner");
  });
});
