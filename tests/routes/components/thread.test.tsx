import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { renderToString } from "react-dom/server";
import { createMemoryRouter, RouterProvider } from "react-router";
import { describe, expect, test } from "vitest";
import { ShownUnitProvider } from "~/components/shown-unit";
import { sizeInWords } from "~/components/thread/attachment-list";
import { MessageRow } from "~/components/thread/message-row";
import { Thread } from "~/components/thread/thread";
import { THREAD_PAGE, type ThreadData, type ThreadMessage } from "~/components/thread/thread-data";
import { Unread } from "~/components/thread/unread";

function html(
  element: React.ReactNode,
  fetched?: { audience: "builder" | "staff"; thread: ThreadData },
): string {
  const client = new QueryClient();
  if (fetched) client.setQueryData(["thread", "order-1", fetched.audience, THREAD_PAGE], fetched.thread);
  const router = createMemoryRouter([
    { path: "*", element: <QueryClientProvider client={client}>{element}</QueryClientProvider> },
  ]);
  return renderToString(<RouterProvider router={router} />);
}
/** As a reader sees it: tags taken out, React's text separators too. */
const words = (markup: string): string => markup.replace(/<!-- -->/g, "").replace(/<[^>]*>/g, "");

const MESSAGE: ThreadMessage = {
  id: "m1",
  side: "builder",
  audience: "both",
  author: "Wren Halloran",
  mine: false,
  body: "Is <b>1.2 mm</b> enough?\nThanks",
  partLabel: "C",
  spot: { x: 210.04, y: 30 },
  createdAt: "2026-12-01T18:00:00.000Z",
  attachments: [
    {
      id: "a1",
      fileName: "stove corner.png",
      contentType: "image/png",
      size: 340_200,
      href: "/api/orders/order-1/attachments/a1",
    },
    {
      id: "a2",
      fileName: "plan.dxf",
      contentType: "image/vnd.dxf",
      size: 1_240_000,
      href: "/api/orders/order-1/attachments/a2",
    },
  ],
};
const THREAD: ThreadData = {
  messages: [
    MESSAGE,
    { ...MESSAGE, id: "m2", mine: true, createdAt: "2026-12-01T19:00:00.000Z", attachments: [] },
  ],
  earlier: false,
  unread: 0,
  readAt: "2026-12-01T17:00:00.000Z",
  newestEvent: 3,
  undelivered: [],
};
const row = (message: ThreadMessage, onOpenSpot?: () => void) =>
  html(<MessageRow message={message} firstNew={false} onOpenSpot={onOpenSpot} />);

describe("a message", () => {
  test("says who wrote, keeps the lines, and lets nobody write markup", () => {
    const shown = row(MESSAGE);
    expect(shown).not.toContain("<b>");
    expect(words(shown)).toContain("Wren Halloran");
    expect(shown).toMatch(/whitespace-pre-wrap[^>]*>Is &lt;b&gt;1\.2 mm&lt;\/b&gt; enough\?\nThanks</);
    expect(words(row({ ...MESSAGE, mine: true }))).toMatch(/^You/);
  });

  test("that points somewhere is a button where the page can show the place, words where it cannot", () => {
    expect(row(MESSAGE, () => undefined)).toContain('<button type="button"');
    expect(words(row(MESSAGE, () => undefined))).toContain(
      "Part C at 210.0, 30.0\u2009mm, show it on the drawing",
    );
    expect(row(MESSAGE)).not.toContain("<button");
    expect(words(row(MESSAGE))).toContain("Part C at 210.0, 30.0\u2009mm");
    expect(words(row({ ...MESSAGE, partLabel: null, spot: null }))).not.toContain("Part");
  });

  test("shows lengths in its reader's unit", () => {
    // 210.04 / 25.4 = 8.269
    expect(
      words(
        html(
          <ShownUnitProvider unit="in">
            <MessageRow message={MESSAGE} firstNew={false} onOpenSpot={undefined} />
          </ShownUnitProvider>,
        ),
      ),
    ).toContain("8.269");
  });

  test("gives its files as downloads, a picture seen in place and a drawing not", () => {
    const shown = row(MESSAGE);
    expect(shown.match(/<img/g)).toHaveLength(1);
    expect(shown).toContain('src="/api/orders/order-1/attachments/a1"');
    for (const name of ["stove corner.png", "plan.dxf"]) expect(shown).toContain(`download="${name}"`);
    expect(words(shown)).toContain("340 kB");
    expect(words(shown)).toContain("1.2 MB");
  });

  test("for the staff alone says so in words, not by its look only", () => {
    expect(words(row({ ...MESSAGE, audience: "staff" }))).toContain("note, staff only");
    expect(words(row(MESSAGE))).not.toContain("staff");
  });
});

describe("the thread", () => {
  const shown = (audience: "builder" | "staff", thread: ThreadData = THREAD) =>
    html(<Thread orderId="order-1" audience={audience} />, { audience, thread });

  test("marks the first of others' messages after what was read", () => {
    const marked = (readAt: string | null) =>
      (words(shown("builder", { ...THREAD, readAt })).match(/new(?=Wren|You)/g) ?? []).length;
    expect([marked("2026-12-01T17:00:00.000Z"), marked("2026-12-01T18:30:00.000Z"), marked(null)]).toEqual([
      1, 0, 0,
    ]);
  });

  test("offers a note to the staff only, and no style attribute that the policy would refuse", () => {
    expect(words(shown("staff"))).toContain("A note for the staff only");
    expect(words(shown("builder"))).not.toContain("note");
    for (const side of ["staff", "builder"] as const) expect(shown(side)).not.toContain("style=");
  });

  test("tells a builder of a mail that did not arrive without the mail host's words, the staff with them", () => {
    const undelivered = [
      {
        id: "x",
        subject: "KP-1 is cut",
        recipient: "wren@kerfpost.example",
        error: "550 no such mailbox",
        createdAt: MESSAGE.createdAt,
      },
    ];
    const builder = words(shown("builder", { ...THREAD, undelivered }));
    expect(builder).toContain("A mail did not arrive");
    expect(builder).toContain("“KP-1 is cut” to wren@kerfpost.example");
    expect(builder).not.toContain("550");
    expect(words(shown("staff", { ...THREAD, undelivered }))).toContain("550 no such mailbox");
  });

  test("says what stands there before it is fetched, and when there is nothing", () => {
    expect(words(html(<Thread orderId="order-1" audience="builder" />))).toContain("on their way");
    expect(words(shown("builder", { ...THREAD, messages: [] }))).toContain("Nobody has written yet.");
    expect(words(shown("builder", { ...THREAD, earlier: true }))).toContain("Show earlier messages");
  });

  test("offers to point at what is chosen on the page", () => {
    const pointing = { partLabel: "B", spot: { x: 12.34, y: 56 } };
    const markup = html(<Thread orderId="order-1" audience="builder" pointing={pointing} />, {
      audience: "builder",
      thread: THREAD,
    });
    expect(words(markup)).toContain("Point at part B at 12.3, 56.0\u2009mm");
  });
});

test("counts of unread messages, none for none", () => {
  expect(words(html(<Unread count={1} />))).toBe("1 unread message");
  expect(words(html(<Unread count={12} />))).toBe("12 unread messages");
  expect(html(<Unread count={0} />)).toBe("");
});

test("sizes of files in words", () => {
  // Decimal prefixes, IEC 80000-13 4.
  expect([0, 999, 1_000, 999_499, 999_500, 10_485_760].map(sizeInWords)).toEqual([
    "0 B",
    "999 B",
    "1 kB",
    "999 kB",
    "1.0 MB",
    "10.5 MB",
  ]);
});
