import type { Metadata } from "next";
import { AuthFrame } from "@/components/auth/auth-frame";
import { InvitationForm } from "@/components/auth/password-forms";

export const metadata: Metadata = { title: "Join a shop", referrer: "no-referrer" };

export default async function InvitationPage({ params }: { readonly params: Promise<{ token: string }> }) {
  const { token } = await params;
  return (
    <AuthFrame title="Join a shop" lead="You were invited by mail. The link works once.">
      <InvitationForm token={token} />
    </AuthFrame>
  );
}
