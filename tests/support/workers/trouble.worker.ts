/** A worker that behaves as told: what the pool must survive. */
export default async function trouble(how: string): Promise<unknown> {
  if (how === "answer") return { answer: 42 };
  if (how === "throw") throw new Error("thrown on purpose");
  if (how === "exit") process.exit(3);
  /** A heap that grows by little ends its thread; one that grows by much at once ends its process. */
  const mouthful = { hang: 0, devour: 1_000_000, gorge: 8_000_000 }[how];
  if (mouthful === undefined) throw new Error(`No such trouble: ${how}`);
  const kept: number[][] = [];
  for (;;) if (mouthful > 0) kept.push(new Array(mouthful).fill(0.5));
}
