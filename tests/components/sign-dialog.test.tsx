// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { Decision } from "@/components/review/decision";
import { SignDialog } from "@/components/review/sign-dialog";
import { Unverified } from "@/components/review/unverified";
import { answerWith, prepareDialogs } from "./browser";
import { reviewDetail } from "./review-fixture";

const push = vi.fn();
vi.mock("next/navigation", () => ({ useRouter: () => ({ push }) }));

beforeAll(prepareDialogs);
afterEach(() => {
  cleanup();
  push.mockClear();
  vi.unstubAllGlobals();
});

const VIF = [{ pointId: "m-3", text: "2'-4\" assumed" }];

function fill(password: string, tick: boolean): void {
  if (tick) fireEvent.click(screen.getByRole("checkbox"));
  fireEvent.change(screen.getByLabelText("Your password, again"), { target: { value: password } });
  fireEvent.click(screen.getByRole("button", { name: "Sign" }));
}

describe("SignDialog", () => {
  it("asks for the password again and the acknowledgement before anything is sent", async () => {
    const sent = answerWith(200, {});
    render(<SignDialog open review={reviewDetail()} accepted={[]} onClose={() => undefined} />);
    fill("", false);
    expect(await screen.findByText("Enter your password again to sign.")).toBeTruthy();
    expect(screen.getByText("Confirm this to release the sheet.")).toBeTruthy();
    expect(sent).toEqual([]);
  });

  it("sends the password, the accepted dimensions and the acknowledgement once, then goes to the spool", async () => {
    const sent = answerWith(200, {});
    const closed = vi.fn();
    render(
      <SignDialog open review={reviewDetail({ unverified: VIF })} accepted={["m-3"]} onClose={closed} />,
    );
    expect(screen.getByText(/2'-4" assumed/)).toBeTruthy();
    fill("a long password", true);
    await waitFor(() => expect(closed).toHaveBeenCalledTimes(1));
    expect(sent).toEqual([
      {
        method: "POST",
        path: "/api/revisions/r2/sign",
        body: { password: "a long password", accepted: ["m-3"], verified: true },
      },
    ]);
    expect(push).toHaveBeenCalledWith("/spools/s1");
  });

  it("shows the server's sentence at the password and keeps the dialog and what was typed", async () => {
    answerWith(403, {
      code: "forbidden",
      message: "Not signed.",
      fields: { password: "That is not your password." },
    });
    const closed = vi.fn();
    render(<SignDialog open review={reviewDetail()} accepted={[]} onClose={closed} />);
    fill("wrong password", true);
    expect(await screen.findByText("That is not your password.")).toBeTruthy();
    expect(closed).not.toHaveBeenCalled();
    expect((screen.getByLabelText("Your password, again") as HTMLInputElement).value).toBe("wrong password");
  });

  it("shows a refusal that belongs to no field at the head of the form", async () => {
    answerWith(409, { code: "conflict", message: "Ingrid Solheim signed it a moment ago." });
    render(<SignDialog open review={reviewDetail()} accepted={[]} onClose={() => undefined} />);
    fill("a long password", true);
    expect((await screen.findByRole("alert")).textContent).toContain(
      "Ingrid Solheim signed it a moment ago.",
    );
  });
});

describe("Decision", () => {
  it("does not offer to sign while an unverified dimension is not accepted", () => {
    const review = reviewDetail({ unverified: VIF });
    const { rerender } = render(<Decision review={review} accepted={[]} />);
    expect((screen.getByRole("button", { name: "Sign for fabrication" }) as HTMLButtonElement).disabled).toBe(
      true,
    );
    expect(screen.getByText(/1 unverified dimension above is not accepted/)).toBeTruthy();
    rerender(<Decision review={review} accepted={["m-3"]} />);
    expect((screen.getByRole("button", { name: "Sign for fabrication" }) as HTMLButtonElement).disabled).toBe(
      false,
    );
  });

  it("leaves out what the viewer may not do", () => {
    render(
      <Decision
        review={reviewDetail({ can: { sign: false, return: true, hold: false, void: false } })}
        accepted={[]}
      />,
    );
    expect(screen.queryByRole("button", { name: "Sign for fabrication" })).toBeNull();
    expect(screen.queryByRole("button", { name: "Put on hold" })).toBeNull();
    expect(screen.queryByRole("button", { name: "Void the revision" })).toBeNull();
    expect(screen.getByRole("button", { name: "Return the revision" })).toBeTruthy();
  });

  it("returns with a reason, and not without one", async () => {
    const sent = answerWith(200, {});
    render(<Decision review={reviewDetail()} accepted={[]} />);
    fireEvent.click(screen.getByRole("button", { name: "Return the revision" }));
    fireEvent.click(screen.getByRole("button", { name: "Return it" }));
    expect(await screen.findByText("Give a reason the next person can act on.")).toBeTruthy();
    fireEvent.change(screen.getByLabelText("Reason"), { target: { value: "Valve tag missing" } });
    fireEvent.click(screen.getByRole("button", { name: "Return it" }));
    await waitFor(() =>
      expect(sent).toEqual([
        { method: "POST", path: "/api/revisions/r2/return", body: { reason: "Valve tag missing" } },
      ]),
    );
  });
});

describe("Unverified", () => {
  it("lets the signer accept each by name, and others read only", () => {
    const toggled: string[] = [];
    const { rerender } = render(
      <Unverified
        dimensions={VIF}
        accepted={new Set()}
        onToggle={(id) => toggled.push(id)}
        mayAccept
        name="Ingrid Solheim"
      />,
    );
    expect(screen.getByText(/you, Ingrid Solheim/)).toBeTruthy();
    fireEvent.click(screen.getByRole("checkbox"));
    expect(toggled).toEqual(["m-3"]);
    rerender(
      <Unverified
        dimensions={VIF}
        accepted={new Set()}
        onToggle={() => undefined}
        mayAccept={false}
        name=""
      />,
    );
    expect(screen.queryByRole("checkbox")).toBeNull();
  });
});
