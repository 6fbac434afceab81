/** A worker that behaves as told: what the pool must survive. */
export default async function trouble(
  how: "answer" | "hang" | "devour" | "throw" | "exit",
): Promise<unknown> {
  if (how === "answer") return { answer: 42 };
  if (how === "throw") throw new Error("thrown on purpose");
  if (how === "exit") process.exit(3);
  const kept: object[][] = [];
  for (;;) if (how === "devour") kept.push(new Array(8_000_000).fill({}));
}
