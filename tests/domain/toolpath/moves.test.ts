import { describe, expect, it } from "vitest";
import { chipLoad, distanceToReachFeed, feedRate, moveTime, peakSpeed } from "~/domain/toolpath";

/** 400 in/min and 40 in/s²; all values by the rest-to-rest kinematics t = d/v + v/a and t = 2√(d/a). */
const fast = { feed: 400 / 60, acceleration: 40 };

describe("a move from rest to rest", () => {
  it("takes 3.7667 s over 24 in (kinematics)", () => {
    expect(moveTime({ distance: 24, ...fast })).toBeCloseTo(3.7667, 4);
  });

  it("takes 0.2236 s over 0.5 in and peaks at 268.3 in/min (kinematics, triangle)", () => {
    expect(moveTime({ distance: 0.5, ...fast })).toBeCloseTo(0.2236, 4);
    expect(peakSpeed({ distance: 0.5, ...fast }) * 60).toBeCloseTo(268.3, 1);
  });

  it("takes 11.4667 s round a 24 × 12 in rectangle with a stop at each corner (kinematics)", () => {
    const seconds = [24, 12, 24, 12].reduce((sum, distance) => sum + moveTime({ distance, ...fast }), 0);
    expect(seconds).toBeCloseTo(11.4667, 4);
  });

  it("needs 1.1111 in to touch full feed and stop, where both formulas agree (v²/a)", () => {
    const distance = distanceToReachFeed(fast.feed, fast.acceleration);
    expect(distance).toBeCloseTo(1.1111, 4);
    expect(moveTime({ distance, ...fast })).toBeCloseTo(2 * Math.sqrt(distance / fast.acceleration), 12);
    expect(peakSpeed({ distance: 100, ...fast })).toBe(fast.feed);
  });

  it("takes 100 s over 100 in in 1,000 stopped chords and 15.17 s in one move (kinematics, upper bound)", () => {
    expect(1000 * moveTime({ distance: 0.1, ...fast })).toBeCloseTo(100, 2);
    expect(moveTime({ distance: 100, ...fast })).toBeCloseTo(15.17, 2);
  });

  it("takes no time over no distance", () => {
    expect(moveTime({ distance: 0, ...fast })).toBe(0);
  });
});

describe("feed = rpm × flutes × chip load", () => {
  it("gives 396 in/min at 18,000 rpm, 2 flutes, 0.011 in (standard machining formula)", () => {
    expect(feedRate(18000, 2, 0.011)).toBeCloseTo(396, 9);
  });

  it("gives 3,600 mm/min at 18,000 rpm, 2 flutes, 0.1 mm (tool trade feed guide, published example)", () => {
    expect(feedRate(18000, 2, 0.1)).toBeCloseTo(3600, 9);
  });

  it("gives back 0.0167 in from 500 in/min at 15,000 rpm, 2 flutes (tool trade feed guide, published example)", () => {
    expect(chipLoad(500, 15000, 2)).toBeCloseTo(0.0167, 4);
  });
});
