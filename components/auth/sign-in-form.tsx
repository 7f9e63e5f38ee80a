"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { signIn } from "next-auth/react";
import Link from "next/link";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { signInSchema, type SignInForm } from "@/lib/rules/forms";

export interface DemoLogin {
  readonly name: string;
  readonly email: string;
  /** Role in words. */
  readonly role: string;
}

export interface SignInFormProps {
  /** Path to go to afterwards; "/" sends each role to its own start. */
  readonly next: string;
  /** Demo people and their common password; null outside demo mode. */
  readonly demo: { readonly people: readonly DemoLogin[]; readonly password: string } | null;
  /** Sentence to show first, such as after a new password. */
  readonly remark?: string | null;
}

const REFUSALS: Readonly<Record<string, string>> = {
  CredentialsSignin: "E-mail address and password do not match. Check both, or set a new password.",
  throttled: "Too many tries. Wait a few minutes, then try again.",
};

function refusalText(error: string | null | undefined, status: number): string {
  if (status === 429) return REFUSALS.throttled ?? "";
  if (!error) return "The server did not answer. Try again.";
  return REFUSALS[error] ?? (error.includes(" ") ? error : (REFUSALS.CredentialsSignin ?? ""));
}

/** E-mail address and password; in demo mode also the demo people, one press each. */
export function SignInForm({ next, demo, remark }: SignInFormProps) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const { register, handleSubmit, setValue, formState } = useForm<SignInForm>({
    resolver: zodResolver(signInSchema),
    defaultValues: { email: "", password: "" },
  });

  const enter = async (values: SignInForm) => {
    setTrouble(null);
    const answer = await signIn("credentials", { ...values, redirect: false }).catch(() => undefined);
    if (answer?.ok) window.location.assign(next);
    else setTrouble(refusalText(answer?.error, answer?.status ?? 0));
  };
  const choose = (person: DemoLogin) => {
    setValue("email", person.email);
    setValue("password", demo?.password ?? "");
    void handleSubmit(enter)();
  };

  return (
    <>
      {remark ? <Notice className="mb-4">{remark}</Notice> : null}
      <form noValidate onSubmit={(event) => void handleSubmit(enter)(event)} className="space-y-4">
        {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
        <TextField
          label="E-mail address"
          type="email"
          autoComplete="username"
          error={formState.errors.email?.message}
          {...register("email")}
        />
        <TextField
          label="Password"
          type="password"
          autoComplete="current-password"
          error={formState.errors.password?.message}
          {...register("password")}
        />
        <Button
          type="submit"
          tone="primary"
          className="w-full"
          busy={formState.isSubmitting}
          busyLabel="Signing in"
        >
          Sign in
        </Button>
      </form>
      <p className="mt-4 flex flex-wrap justify-between gap-x-4">
        <Link href="/reset" className="inked inline-flex min-h-11 items-center">
          Set a new password
        </Link>
        <Link href="/sign-up" className="inked inline-flex min-h-11 items-center">
          Open a new shop
        </Link>
      </p>
      {demo ? <DemoLogins people={demo.people} password={demo.password} onChoose={choose} /> : null}
    </>
  );
}

function DemoLogins({
  people,
  password,
  onChoose,
}: {
  readonly people: readonly DemoLogin[];
  readonly password: string;
  readonly onChoose: (person: DemoLogin) => void;
}) {
  return (
    <section aria-labelledby="demo-logins" className="mt-5 border-t border-ink pt-4">
      <h2 id="demo-logins">Demo logins</h2>
      <p className="mb-2 text-sm text-soft">
        An invented shop on this machine only. Password of all: <span className="figure">{password}</span>
      </p>
      <ul>
        {people.map((person) => (
          <li key={person.email} className="border-b border-hair last:border-b-0">
            <button
              type="button"
              onClick={() => onChoose(person)}
              className="flex min-h-14 w-full items-center justify-between gap-3 text-left hover:bg-dye-tint"
            >
              <span className="min-w-0">
                <span className="block font-medium text-dye underline underline-offset-4">{person.name}</span>
                <span className="figure block text-sm break-all text-soft">{person.email}</span>
              </span>
              <span className="shrink-0">{person.role}</span>
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
