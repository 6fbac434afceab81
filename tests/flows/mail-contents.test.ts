import { describe, expect, test } from "vitest";
import { invitationMail, resetMail, verificationMail } from "~/documents/mails/account";
import { cancelledMail } from "~/documents/mails/cancelled";
import { holdMail } from "~/documents/mails/hold";
import type { Mail } from "~/documents/mails/layout";
import { messageMail } from "~/documents/mails/message";
import { ownerAttentionMail } from "~/documents/mails/owner-attention";
import { quoteMail } from "~/documents/mails/quote-ready";
import { readyToCollectMail } from "~/documents/mails/ready-to-collect";
import { receiptMail } from "~/documents/mails/receipt";
import { refundMail } from "~/documents/mails/refund";
import { sentBackMail } from "~/documents/mails/sent-back";
import { shortageMail } from "~/documents/mails/shortage";
import { stageMail } from "~/documents/mails/stage";
import type { Stage } from "~/domain/orders";

const ORDER = {
  shopName: "Alder Ferry Panelworks",
  recipientName: "Wren O'Halloran",
  reference: "KP-2047",
  orderName: "Galley <port> & co",
  url: "https://desk.example/orders/0123",
  timeZone: "America/Los_Angeles",
};
const OFF = { what: "stages", url: "https://desk.example/unsubscribe?token=a.b&c" };
/** 06:30 UTC is still the evening of the day before in the shop's zone. */
const FRIDAY = new Date("2026-12-05T06:30:00Z");
const FRIDAY_WORDS = "Friday, December 4";
const PARCELS = [
  { number: 1, tracking: null, service: null },
  { number: 2, tracking: "TP 0042", service: "ground-plus" },
];
const MONEY = { amount: 24_455, currency: "usd" };

const stage = (name: Stage, delivery: "ship" | "pick-up" = "ship"): Mail => {
  const mail = stageMail({
    ...ORDER,
    stage: name,
    delivery,
    promisedFor: FRIDAY,
    parcels: PARCELS,
    unsubscribe: OFF,
  });
  if (!mail) throw new Error(`There is no mail for ${name}.`);
  return mail;
};
const account = {
  shopName: ORDER.shopName,
  recipientName: ORDER.recipientName,
  url: "https://desk.example/x?token=1&y=2",
};
const quote = {
  ...ORDER,
  quoteNumber: 3,
  total: 24_455,
  currency: "usd",
  expiresAt: FRIDAY,
  promisedFor: new Date("2026-12-10T20:00:00Z"),
  unsubscribe: OFF,
};
const EVERY_ORDER = [ORDER.shopName, ORDER.recipientName, ORDER.reference, ORDER.orderName, ORDER.url];

/** Each mail with every fact it has to say. */
const MAILS: readonly (readonly [string, Mail, readonly string[]])[] = [
  [
    "verification",
    verificationMail(account),
    [account.shopName, account.recipientName, account.url, "one day"],
  ],
  ["reset", resetMail(account), [account.shopName, account.recipientName, account.url, "one hour"]],
  [
    "invitation",
    invitationMail({ ...account, invitedBy: "Ada <Ferrier>", roles: ["operator", "clerk"] }),
    [account.url, "Ada <Ferrier>", "operator and clerk", "seven days"],
  ],
  [
    "quote",
    quoteMail({ ...quote, review: [], questions: 2 }),
    [...EVERY_ORDER, "$244.55", FRIDAY_WORDS, "Thursday, December 10", "2 questions", OFF.url],
  ],
  [
    "quote under review",
    quoteMail({ ...quote, review: ["it comes to more than $200.00", "you asked for it"], questions: 0 }),
    [...EVERY_ORDER, "$244.55", "it comes to more than $200.00", "you asked for it", OFF.url],
  ],
  [
    "receipt",
    receiptMail({
      ...ORDER,
      ...MONEY,
      quoteNumber: 3,
      paidAt: FRIDAY,
      receiptUrl: "https://pay.example/r?a=1&b=2",
      promisedFor: new Date("2026-12-10T20:00:00Z"),
      inTime: true,
    }),
    [
      ...EVERY_ORDER,
      "$244.55",
      "quote 3",
      FRIDAY_WORDS,
      "Thursday, December 10",
      "https://pay.example/r?a=1&b=2",
    ],
  ],
  [
    "late receipt",
    receiptMail({
      ...ORDER,
      ...MONEY,
      quoteNumber: 3,
      paidAt: FRIDAY,
      receiptUrl: null,
      promisedFor: null,
      inTime: false,
    }),
    [...EVERY_ORDER, "$244.55", "could no longer take this payment"],
  ],
  [
    "refund",
    refundMail({ ...ORDER, ...MONEY, reason: "one <part> spoiled" }),
    [...EVERY_ORDER, "$244.55", "one <part> spoiled", "five to ten days"],
  ],
  [
    "hold",
    holdMail({ ...ORDER, reason: "the sheet's core is open" }),
    [...EVERY_ORDER, "the sheet's core is open"],
  ],
  [
    "cancelled, paid",
    cancelledMail({ ...ORDER, reason: "you asked", wasPaid: true }),
    [...EVERY_ORDER, "you asked", "comes back to you"],
  ],
  [
    "cancelled, not paid",
    cancelledMail({ ...ORDER, reason: "you asked", wasPaid: false }),
    [...EVERY_ORDER, "you asked", "Nothing is owed"],
  ],
  [
    "shortage",
    shortageMail({
      ...ORDER,
      partLabel: "1C",
      partName: "shelf & lip",
      number: 2,
      of: 4,
      state: "missing",
      cause: "not in the <pile>",
      payer: "carrier",
      promisedFor: FRIDAY,
    }),
    [
      ...EVERY_ORDER,
      "1C shelf & lip",
      "2 of 4",
      "missing",
      "not in the <pile>",
      "carrier is asked",
      FRIDAY_WORDS,
    ],
  ],
  [
    "owner's attention",
    ownerAttentionMail({
      shopName: ORDER.shopName,
      name: "Ada",
      subject: "A late payment",
      words: "KP-2047 was paid <twice>.",
      url: ORDER.url,
    }),
    [ORDER.shopName, "Ada", "KP-2047 was paid <twice>.", ORDER.url],
  ],
  [
    "message",
    messageMail({
      earlier: false,
      ...ORDER,
      unsubscribe: OFF,
      messages: [
        {
          authorName: "Odile Marsh",
          writtenAt: FRIDAY,
          body: "Two <lines>\nof words",
          partLabel: "C",
          spot: { x: 210.04, y: 30 },
          files: ["photo 1.png", "plan & cut.pdf"],
        },
        {
          authorName: "Ada Ferrier",
          writtenAt: FRIDAY,
          body: "",
          partLabel: null,
          spot: null,
          files: ["b.dxf"],
        },
      ],
    }),
    [
      ...EVERY_ORDER,
      "Odile Marsh",
      "Ada Ferrier",
      "Friday, December 4",
      "10:30",
      "Two <lines>",
      "of words",
      "part C at 210.0, 30.0 mm",
      "photo 1.png, plan & cut.pdf",
      "b.dxf",
      OFF.url,
    ],
  ],
  ["stage quoted", stage("quoted"), [...EVERY_ORDER, "can be paid", OFF.url]],
  ["stage received", stage("received"), [...EVERY_ORDER, "is in the shop", FRIDAY_WORDS, OFF.url]],
  ["stage nested", stage("nested"), [...EVERY_ORDER, "is nested", FRIDAY_WORDS, OFF.url]],
  ["stage cut", stage("cut"), [...EVERY_ORDER, "is cut", FRIDAY_WORDS, OFF.url]],
  [
    "sent back",
    sentBackMail({ ...ORDER, reason: "part <part> is open" }),
    [...EVERY_ORDER, "needs a change", "part <part> is open", "nothing is owed"],
  ],
  [
    "ready to collect",
    readyToCollectMail({
      ...ORDER,
      pieces: 13,
      kilograms: 42.4,
      heaviest: 11.26,
      address: ["4 Ferry Lane", "Marrow Point"],
      phone: "555-0100",
    }),
    [...EVERY_ORDER, "ready to pick up", "13", "42 kg", "11.3 kg", "4 Ferry Lane, Marrow Point", "555-0100"],
  ],
  [
    "stage tabs-removed, to ship",
    stage("tabs-removed"),
    [...EVERY_ORDER, "has its tabs off", "counted and packed next", OFF.url],
  ],
  [
    "stage tabs-removed, to pick up",
    stage("tabs-removed", "pick-up"),
    [...EVERY_ORDER, "has its tabs off", "counted next", OFF.url],
  ],
  [
    "stage shipped",
    stage("shipped"),
    [...EVERY_ORDER, "has shipped", "packing list", "Parcel 2, ground plus", "TP 0042", OFF.url],
  ],
  [
    "stage shipped, picked up",
    stage("shipped", "pick-up"),
    [...EVERY_ORDER, "was picked up", "handed over to you", OFF.url],
  ],
];

/** What a reader of the HTML sees: tags taken out, addresses of links kept, entities read. */
function wordsOf(html: string): string {
  const links = [...html.matchAll(/href="([^"]*)"/g)].map(([, href]) => href);
  return `${html.replace(/<head>[\s\S]*<\/head>/, "").replace(/<[^>]*>/g, " ")} ${links.join(" ")}`
    .replaceAll("&lt;", "<")
    .replaceAll("&gt;", ">")
    .replaceAll("&quot;", '"')
    .replaceAll("&#39;", "'")
    .replaceAll("&amp;", "&");
}

describe.each(MAILS)("the %s mail", (_name, mail, facts) => {
  test("says every fact in its plain text and in its HTML, nothing unescaped", () => {
    for (const fact of facts) {
      expect.soft(`${mail.subject}\n${mail.text}`, "text").toContain(fact);
      expect.soft(wordsOf(mail.html), "html").toContain(fact);
    }
    expect(mail.html).not.toMatch(/<(port|part|pile|lines|twice|Ferrier)>/);
    expect(mail.subject).not.toMatch(/[\r\n]/);
  });

  test("has the one look, readable without pictures or another host", () => {
    expect(mail.html).toMatch(/^<!doctype html>\n<html lang="en">/);
    expect(mail.html).toContain('kerf<span style="color:#1d3fb8">|</span>post');
    expect(mail.html).not.toMatch(/<img|<link|<script|url\(|@import|background-image/);
    expect(mail.text).not.toMatch(/<\/?(div|p|span|a|html)\b|undefined|null|NaN|Invalid/);
    expect(wordsOf(mail.html)).not.toMatch(/undefined|null|NaN|Invalid/);
  });
});

test("a kind that cannot be turned off offers nothing to turn off", () => {
  for (const [name, { text, html }, facts] of MAILS) {
    const offered = facts.includes(OFF.url);
    expect(text.includes("Turn off"), name).toBe(offered);
    expect(html.includes("Turn off"), name).toBe(offered);
  }
});
