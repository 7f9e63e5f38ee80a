import type { Metadata } from "next";
import { AuthFrame } from "@/components/auth/auth-frame";
import { SignInForm } from "@/components/auth/sign-in-form";
import { ROLE_WORDS } from "@/components/shell/places";
import { DEMO_PASSWORD, DEMO_PEOPLE } from "@/lib/rules/demo-people";

export const metadata: Metadata = { title: "Sign in" };

const REMARKS: Readonly<Record<string, string>> = {
  password: "Your new password is saved. Sign in with it.",
  joined: "You have joined the shop. Sign in to begin.",
};

/** A path of this site, or "/" for anything else: a link in a mail must not lead somewhere foreign. */
function ownPath(next: string | undefined): string {
  return next && /^\/[A-Za-z0-9]/.test(next) ? next : "/";
}

export default async function SignInPage({
  searchParams,
}: {
  readonly searchParams: Promise<Record<string, string | undefined>>;
}) {
  const query = await searchParams;
  const demo = process.env.DEMO === "1";
  const people = DEMO_PEOPLE.map(({ name, email, role }) => ({ name, email, role: ROLE_WORDS[role] }));
  return (
    <AuthFrame title="Sign in">
      <SignInForm
        next={ownPath(query.next)}
        demo={demo ? { people, password: DEMO_PASSWORD } : null}
        remark={REMARKS[query.remark ?? ""] ?? null}
      />
    </AuthFrame>
  );
}
