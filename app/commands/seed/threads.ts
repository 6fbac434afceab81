import type { DemoMessage } from "./talk";

/** What is asked and answered on some orders of the demonstration, by the order's name. */
export const THREADS: Readonly<Record<string, readonly DemoMessage[]>> = {
  "Serving trays, first dozen": [
    {
      from: "builder",
      hoursAgo: 500,
      body: "One tray came with a bruised corner. The rest are lovely. What do we do about it?",
    },
    {
      from: "owner",
      hoursAgo: 496,
      body: "Sorry about that. I have sent the price of the tray back to your card; keep it for a test finish.",
    },
    { from: "builder", hoursAgo: 495, body: "That is fair, thank you." },
  ],
  "Kiosk menu frame": [
    {
      from: "operator",
      hoursAgo: 20,
      body: "The edge of the inner frame opened at a void in the core. I have put another on the next sheet; it costs you nothing and ships with the rest.",
      part: "B",
    },
    { from: "builder", hoursAgo: 18, body: "Good to know before it was painted. Does the date hold?" },
    {
      from: "operator",
      hoursAgo: 17,
      body: "It slips by a day. The new piece is on tomorrow's first sheet.",
    },
    {
      from: "operator",
      hoursAgo: 17,
      body: "Third void in this pallet: measure the next stack before it is used.",
      staffOnly: true,
    },
  ],
  "Bunk side, pair": [
    {
      from: "operator",
      hoursAgo: 30,
      body: "The boards in this lot are warped more than I like for parts this long. A new stack comes on Thursday; may it wait for that?",
    },
    { from: "builder", hoursAgo: 26, body: "Please wait. Straight is worth more to me than early." },
  ],
  "Reading room counter": [
    {
      from: "builder",
      hoursAgo: 22,
      body: "Could somebody look at the tenons before I pay? They seat in mortises that go right through, and I have drawn both at 18 mm.",
    },
    {
      from: "operator",
      hoursAgo: 4,
      body: "Your lot measures 17.82 to 18.04 mm, so a mortise drawn at 18.0 is a press at one end of the stack and slack at the other. I would draw 18.3. Shall I send it back to you for that?",
      part: "A",
    },
  ],
  "Galley carcass, port side": [
    {
      from: "builder",
      hoursAgo: 12,
      body: "The fan hole takes a 150 mm unit with a flange. Is 160 on the drawing what you cut, or less by the cutter?",
      part: "E",
    },
    {
      from: "operator",
      hoursAgo: 3,
      body: "What you draw is what you get: the cutter runs inside the line. 160.0 as drawn.",
    },
  ],
  "Atlas shelves": [
    {
      from: "builder",
      hoursAgo: 28,
      body: "Grain should run along the long side of every shelf. Is that how they lie on the sheet?",
    },
    { from: "operator", hoursAgo: 25, body: "Yes, along the sheet for all eight." },
  ],
  "Cockpit locker doors": [
    {
      from: "builder",
      hoursAgo: 70,
      body: "The hinge cups are drawn at 13 mm deep. Your lot is thinner than nominal: is there wood enough behind them?",
    },
    {
      from: "operator",
      hoursAgo: 66,
      body: "At the thinnest reading there are 4.8 mm left behind the cup, which is fine.",
    },
    {
      from: "clerk",
      hoursAgo: 8,
      body: "These two go in one sleeve with the fan panel for the same harbor; ask before you split them.",
      staffOnly: true,
    },
  ],
  "Chart table drawers": [
    {
      from: "clerk",
      hoursAgo: 380,
      body: "Your drawers are ready to pick up, any day from eight to half past four. Bring a blanket: the edges are sharp.",
    },
    { from: "builder", hoursAgo: 376, body: "I will come by on Friday before noon." },
  ],
  "Bench lid from the old boat": [
    {
      from: "builder",
      hoursAgo: 16,
      body: "This drawing is ten years old and from another program. Two of the lines seem to be in it twice: does that cost me twice?",
    },
    {
      from: "owner",
      hoursAgo: 5,
      body: "No. A line that lies on another is cut once and priced once; the fit report lists it.",
    },
  ],
};
