// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { StateWord } from "@/components/ui/state-word";
import type { RevisionState } from "@/iso";

afterEach(cleanup);

/** The words of the trade as the design states them; an inspector reads them on screen and on paper alike. */
const WORDS: readonly (readonly [RevisionState, string])[] = [
  ["draft", "DRAFT"],
  ["for-review", "FOR REVIEW"],
  ["returned", "RETURNED"],
  ["for-fabrication", "FOR FABRICATION"],
  ["superseded", "SUPERSEDED"],
  ["void", "VOID"],
  ["as-built", "AS-BUILT"],
];

describe("StateWord", () => {
  it.each(WORDS)("says %s as %s with a shape beside it", (state, word) => {
    const { container } = render(<StateWord state={state} />);
    expect(screen.getByText(word)).toBeTruthy();
    expect(container.querySelector(`svg[data-shape="${state}"]`)).not.toBeNull();
  });

  it("gives every state and the hold a shape of its own, so that black and white reads", () => {
    const drawn = WORDS.map(([state]) => {
      const { container, unmount } = render(<StateWord state={state} />);
      const shape = container.querySelector("svg")?.innerHTML ?? "";
      unmount();
      return shape;
    });
    const held =
      render(<StateWord state="draft" hold />).container.querySelector('svg[data-shape="hold"]')?.innerHTML ??
      "";
    const shapes = [...drawn, held];
    expect(shapes.every((shape) => shape.length > 0)).toBe(true);
    expect(new Set(shapes).size).toBe(WORDS.length + 1);
  });

  it("shows HOLD before the state it lies on, and only when held", () => {
    const { container, rerender } = render(<StateWord state="for-fabrication" hold />);
    expect(container.textContent).toBe("HOLDFOR FABRICATION");
    rerender(<StateWord state="for-fabrication" />);
    expect(container.textContent).toBe("FOR FABRICATION");
  });
});
