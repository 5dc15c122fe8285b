import { describe, expect, it } from "vitest";
import { countsInWords, holesInWords, joinWords, moneyStep, numberWriter, shorten } from "../../src/pane/model/numbers.js";

const english = numberWriter("en-GB");

// Expected values: by hand.
describe("numbers for people", () => {
  it("money is rounded to its step and grouped", () => {
    expect(english.money(426_437.2, 100)).toBe("426,400");
    expect(english.money(426_450, 100)).toBe("426,500");
    expect(english.money(12.345, 0.01)).toBe("12.35");
    expect(english.money(-1234, 1)).toBe("\u22121,234");
    expect(english.money(-0.2, 1)).toBe("0");
    expect(english.plain(-0.2, 0)).toBe("0");
  });

  it("the language of the person decides on marks", () => {
    expect(numberWriter("de-DE").plain(1234.5, 1)).toBe("1.234,5");
  });

  it("a chance that is neither none nor certain is never written as none or certain", () => {
    expect(english.percent(0)).toBe("0\u00a0%");
    expect(english.percent(0.004)).toBe("under 1\u00a0%");
    expect(english.percent(0.625)).toBe("63\u00a0%");
    expect(english.percent(0.997)).toBe("over 99\u00a0%");
    expect(english.percent(1)).toBe("100\u00a0%");
  });

  it("money is no finer than its second uncertain figure and never shows more than five figures", () => {
    expect(moneyStep(3600, 427_000)).toBe(100);
    expect(moneyStep(12_500, 427_000)).toBe(1000);
    expect(moneyStep(940, 427_000)).toBe(10);
    expect(moneyStep(0.3, 427_000)).toBe(10);
    expect(moneyStep(0, 427_000)).toBe(10);
    expect(moneyStep(0, 500)).toBe(1);
    expect(moneyStep(0, 0)).toBe(0.01);
    expect(moneyStep(1000, 427_000)).toBe(100);
  });

  it("counts of holes read as words up to twelve", () => {
    expect([0, 1, 2, 12, 13].map(holesInWords)).toEqual(["no holes", "one hole", "two holes", "twelve holes", "13 holes"]);
  });

  it("lists read as people speak", () => {
    expect(joinWords([])).toBe("");
    expect(joinWords(["a", "b"])).toBe("a and b");
    expect(countsInWords([3])).toBe("3");
    expect(countsInWords([3, 4])).toBe("3 and 4");
    expect(countsInWords([2, 3, 4, 7])).toBe("2 to 4 and 7");
    expect(countsInWords([0, 2, 3, 5, 6, 7, 8])).toBe("0, 2, 3 and 5 to 8");
  });

  it("a long text is cut at whole characters", () => {
    expect(shorten("abcdef", 6)).toBe("abcdef");
    expect(shorten("abcdefg", 6)).toBe("abcde\u2026");
    expect(shorten("\u{1F600}\u{1F600}\u{1F600}", 2)).toBe("\u{1F600}\u2026");
  });
});
