// @vitest-environment jsdom
/** The open survey when the signal comes back late: what was typed meanwhile stays, whoever turns out to be signed in. */
import "fake-indexeddb/auto";
import { act, renderHook, waitFor } from "@testing-library/react";
import { SWRConfig } from "swr";
import { afterEach, expect, test, vi } from "vitest";
import type { ReactNode } from "react";
import { emptySurvey } from "@/iso";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import { openSurveyStore } from "@/components/survey/survey-store";
import { useSurvey } from "@/components/survey/use-survey";
import { useViewer } from "@/components/shell/use-viewer";

const LINE = "line-1";
const detail: SurveyDetail = { line: { id: LINE, number: "L-1", title: "" }, job: { id: "j", number: "J-1" }, version: 1, document: emptySurvey("imperial"), odMm: 114.3, uploads: [], updatedAt: null, updatedBy: null };
const viewer = { personId: "me", name: "Ida", email: "", role: "fitter", shop: { id: "s", name: "" }, shops: [], demo: false };

let up = false;
const saved: string[] = [];
function answer(url: string, init?: RequestInit): Promise<Response> {
  if (!up) return Promise.reject(new TypeError("no network"));
  if (url === "/api/viewer") return Promise.resolve(Response.json(viewer));
  if (init?.method !== "PUT") return Promise.resolve(Response.json(detail));
  saved.push(JSON.parse(String(init.body)).document.note);
  return Promise.resolve(Response.json({ version: 2, savedAt: "t" }));
}
afterEach(() => vi.unstubAllGlobals());

const wrapper = ({ children }: { readonly children: ReactNode }) => <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>{children}</SWRConfig>;

test("opens from the device, keeps what is typed while the signal returns, and sends it", async () => {
  vi.stubGlobal("fetch", vi.fn((url: string, init?: RequestInit) => answer(url, init)));
  const store = await openSurveyStore();
  await store.write({ lineId: LINE, personId: "me", document: { ...detail.document, note: "from the scaffold" }, base: detail.document, version: 1, detail, at: "t" });
  const { result } = renderHook(() => ({ survey: useSurvey(LINE), viewer: useViewer() }), { wrapper });
  await waitFor(() => expect(result.current.survey.kind).toBe("open"));
  const open = () => {
    const { survey } = result.current;
    if (survey.kind !== "open") throw new Error("not open");
    return survey.survey;
  };
  expect(open().view).toMatchObject({ document: { note: "from the scaffold" }, word: { kind: "kept" } });

  up = true;
  await act(async () => {
    const known = result.current.viewer.mutate();
    open().change({ ...open().view.document, note: "typed as the signal came back" });
    await known;
  });
  expect(result.current.viewer.data?.personId).toBe("me");
  expect(open().view.document.note).toBe("typed as the signal came back");
  await waitFor(() => expect(open().view.word.kind).toBe("saved"), { timeout: 5_000 });
  expect(saved[saved.length - 1]).toBe("typed as the signal came back");
  expect((await store.read(LINE, "me"))?.document.note).toBe("typed as the signal came back");
});
