import { expect, test } from "vitest";
import { safePath } from "~/auth/safe-path";

test.each([
  ["/orders", "/orders"],
  ["/orders/7?part=A#b", "/orders/7?part=A#b"],
  ["/shop/../owner", "/owner"],
])("%s is a page of this site", (to, path) => {
  expect(safePath(to)).toBe(path);
});

test.each([
  "https://elsewhere.example/",
  "//elsewhere.example/orders",
  "/\\elsewhere.example",
  "/\t/elsewhere.example",
  "/..//elsewhere.example",
  "javascript:alert(1)",
  "orders",
  "",
  null,
  undefined,
])("%j is not", (to) => {
  expect(safePath(to)).toBeNull();
});
