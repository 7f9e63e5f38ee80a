import type { Metadata } from "next";
import { AuthFrame } from "@/components/auth/auth-frame";
import { ResetConfirmForm } from "@/components/auth/password-forms";

export const metadata: Metadata = { title: "Choose a new password", referrer: "no-referrer" };

export default async function ResetConfirmPage({ params }: { readonly params: Promise<{ token: string }> }) {
  const { token } = await params;
  return (
    <AuthFrame title="Choose a new password" lead="Saving it ends your other sessions.">
      <ResetConfirmForm token={token} />
    </AuthFrame>
  );
}
