/** How many messages of an order its reader has not read; nothing when there are none. */
export function Unread({ count }: { readonly count: number }) {
  if (count === 0) return null;
  return (
    <span className="text-small font-semibold whitespace-nowrap text-blue">
      {count} unread {count === 1 ? "message" : "messages"}
    </span>
  );
}
