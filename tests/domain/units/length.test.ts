import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { formatInches, formatLength, INCH_IN_MM, inMillimetres, nearest64th } from "~/domain/units";

describe("lengths", () => {
  it("show 18 mm as 0.7087 in (international inch)", () => {
    expect(formatInches(18, 4)).toBe("0.7087");
  });

  it("take 3/4 in as 19.05 mm, which 18 mm stock misses by 0.0413 in", () => {
    expect(inMillimetres(0.75, "in")).toBeCloseTo(19.05, 12);
    expect((inMillimetres(0.75, "in") - 18) / INCH_IN_MM).toBeCloseTo(0.0413, 4);
  });

  it.each([
    [1525, "60.04"],
    [1220, "48.03"],
    [2440, "96.06"],
    [1250, "49.21"],
    [2500, "98.43"],
  ])("show a panel's %d mm as %s in (arithmetic)", (length, inches) => {
    expect(formatInches(length, 2)).toBe(inches);
  });

  it("name the nearest 64th as a tape reads it", () => {
    expect(nearest64th(420)).toBe("16 17/32");
    expect(nearest64th(19.05)).toBe("3/4");
    expect(nearest64th(25.4)).toBe("1");
    expect(nearest64th(0.1)).toBe("0");
    expect(nearest64th(-12.7)).toBe("-1/2");
  });

  it("are never further than 1/128 in from the 64th named", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 5000, noNaN: true }), (length) => {
        const read = nearest64th(length)
          .split(" ")
          .reduce((sum, word) => {
            const [numerator, denominator = "1"] = word.split("/");
            return sum + Number(numerator) / Number(denominator);
          }, 0);
        expect(Math.abs(read - length / INCH_IN_MM)).toBeLessThanOrEqual(1 / 128 + 1e-9);
      }),
    );
  });

  it("carry their unit after a thin space", () => {
    expect(formatLength(1830, "mm")).toBe("1,830.0\u2009mm");
    expect(formatLength(1830, "in")).toBe("72.047\u2009in");
  });
});
