import { describe, expect, test } from "vitest";
import { ACTS, type Act, mayDo, ROLES, type Role } from "~/domain/orders";

/**
 * Who does what by the product's description of its people: b builder, o operator, c clerk, w owner. A clerk cannot
 * change prices, an operator cannot refund, only the owner invites staff and does everything the staff can.
 */
const ALLOWED: Record<Act, string> = {
  "account.edit": "bocw",
  "order.create": "b",
  "order.read": "bocw",
  "order.edit": "b",
  "order.quote": "b",
  "order.approve": "b",
  "order.pay": "b",
  "order.cancel": "bow",
  "order.message": "bocw",
  "order.review": "ow",
  "order.receive": "ow",
  "order.hold": "ocw",
  "order.undo": "ocw",
  "queue.read": "ocw",
  "piece.move": "ow",
  "piece.remake": "ocw",
  "nest.edit": "ow",
  "schedule.edit": "ow",
  "stock.edit": "ow",
  "shipping.read": "ocw",
  "shipping.edit": "cw",
  "refund.make": "w",
  "staff.invite": "w",
  "machine.edit": "w",
  "price-book.edit": "w",
  "settings.edit": "w",
  "mail.resend": "w",
  "audit.read": "w",
  "figures.read": "w",
};
const LETTER: Record<Role, string> = { builder: "b", operator: "o", clerk: "c", owner: "w" };

test("every act stands in the table of this test", () => {
  expect([...ACTS].sort()).toEqual(Object.keys(ALLOWED).sort());
});

describe.each(ROLES)("%s", (role) => {
  test.each(ACTS)("%s", (act) => {
    expect(mayDo([role], act)).toBe(ALLOWED[act].includes(LETTER[role]));
  });
});

test("the owner does everything the staff can", () => {
  for (const act of ACTS)
    if (mayDo(["operator", "clerk"], act)) expect([act, mayDo(["owner"], act)]).toEqual([act, true]);
});

test("several roles together may do what each of them may, and nothing else", () => {
  for (const act of ACTS)
    expect(mayDo(["operator", "clerk"], act)).toBe(mayDo(["operator"], act) || mayDo(["clerk"], act));
});

test("what is no role means no", () => {
  for (const act of ACTS)
    for (const roles of [[], ["Owner"], ["owner "], ["admin"], ["toString"], [""]])
      expect(mayDo(roles, act)).toBe(false);
});

test("what is no act means no, to the owner too", () => {
  for (const act of ["", "order.READ", "toString", "__proto__", "constructor", "order"])
    expect(mayDo(ROLES, act)).toBe(false);
});
