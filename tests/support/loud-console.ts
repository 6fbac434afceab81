import { afterEach, expect, vi } from "vitest";

const said: string[] = [];
const original = console.error;
console.error = (...words: unknown[]) => {
  said.push(words.map(String).join(" "));
  original(...words);
};

/** A test that expects an error on the console takes it from here; one left over fails the test. */
export const takeConsoleErrors = (): string[] => said.splice(0);

afterEach(() => {
  vi.useRealTimers();
  expect(takeConsoleErrors(), "unexpected console.error").toEqual([]);
});
