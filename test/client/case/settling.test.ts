import { signal } from "@preact/signals";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import { settling } from "../../../client/case/settling.ts";

beforeEach(() => void vi.useFakeTimers({ toFake: ["setTimeout", "clearTimeout", "performance"] }));
afterEach(() => void vi.useRealTimers());

describe("settling", () => {
  test("a change on its own is followed at once", () => {
    const source = signal(1);
    const { value } = settling(source);
    source.value = 2;
    expect(value.value).toBe(2);
  });

  test("changes that crowd each other are followed when they rest", () => {
    const source = signal(0);
    const { value } = settling(source);
    for (let step = 1; step <= 10; step++) {
      source.value = step;
      vi.advanceTimersByTime(16);
    }
    expect(value.value).toBe(1);
    vi.advanceTimersByTime(100);
    expect(value.value).toBe(10);
    source.value = 11;
    expect(value.value).toBe(11);
  });

  test("a crowd that comes back to where it began rests there", () => {
    const source = signal(0);
    const { value } = settling(source);
    source.value = 1;
    source.value = 2;
    source.value = 1;
    vi.advanceTimersByTime(100);
    expect(value.value).toBe(1);
  });

  test("once stopped it follows no more", () => {
    const source = signal(0);
    const { value, stop } = settling(source);
    source.value = 1;
    source.value = 2;
    stop();
    vi.advanceTimersByTime(100);
    expect(value.value).toBe(1);
  });
});
