"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import Link from "next/link";
import { useState } from "react";
import { useForm } from "react-hook-form";
import type { z } from "zod";
import { Button } from "@/components/ui/button";
import { apiSend } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import {
  invitationAcceptSchema,
  resetConfirmSchema,
  resetRequestSchema,
  type InvitationAcceptForm,
} from "@/lib/rules/forms";

type ResetRequest = z.infer<typeof resetRequestSchema>;
type ResetConfirm = z.infer<typeof resetConfirmSchema>;
const EMAIL = ["email"] as const;
const PASSWORD = ["password"] as const;
const INVITED = ["name", "password"] as const;

/** Asks for a link by mail. The answer is the same whether the address is known or not. */
export function ResetRequestForm() {
  const [sent, setSent] = useState(false);
  const { register, handleSubmit, setError, formState } = useForm<ResetRequest>({
    resolver: zodResolver(resetRequestSchema),
    defaultValues: { email: "" },
  });
  const { trouble, send } = useFormSend(setError, EMAIL);
  if (sent) {
    return (
      <Notice tone="done">
        If that address belongs to a person here, a link is on its way. It works once and runs out soon.
      </Notice>
    );
  }
  const ask = (values: ResetRequest) =>
    send(async () => {
      await apiSend("POST", "/api/password-reset", values);
      setSent(true);
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(ask)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <TextField
        label="E-mail address"
        type="email"
        autoComplete="username"
        error={formState.errors.email?.message}
        {...register("email")}
      />
      <Button
        type="submit"
        tone="primary"
        className="w-full"
        busy={formState.isSubmitting}
        busyLabel="Sending"
      >
        Send me a link
      </Button>
      <Link href="/sign-in" className="inked inline-flex min-h-11 items-center">
        Back to sign in
      </Link>
    </form>
  );
}

/** Sets the new password of the person the link belongs to. */
export function ResetConfirmForm({ token }: { readonly token: string }) {
  const { register, handleSubmit, setError, formState } = useForm<ResetConfirm>({
    resolver: zodResolver(resetConfirmSchema),
    defaultValues: { token, password: "" },
  });
  const { trouble, send } = useFormSend(setError, PASSWORD);
  const set = (values: ResetConfirm) =>
    send(async () => {
      await apiSend("POST", "/api/password-reset/confirm", values);
      window.location.assign("/sign-in?remark=password");
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(set)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      {formState.errors.token ? <Notice tone="trouble">{formState.errors.token.message}</Notice> : null}
      <TextField
        label="New password"
        hint="At least 12 characters."
        type="password"
        autoComplete="new-password"
        error={formState.errors.password?.message}
        {...register("password")}
      />
      <Button
        type="submit"
        tone="primary"
        className="w-full"
        busy={formState.isSubmitting}
        busyLabel="Saving"
      >
        Save the new password
      </Button>
      <Link href="/reset" className="inked inline-flex min-h-11 items-center">
        Ask for a new link
      </Link>
    </form>
  );
}

/** Joins a shop by invitation. Someone who has a password here already gives that one. */
export function InvitationForm({ token }: { readonly token: string }) {
  const { register, handleSubmit, setError, formState } = useForm<InvitationAcceptForm>({
    resolver: zodResolver(invitationAcceptSchema),
    defaultValues: { token, name: "", password: "" },
  });
  const { trouble, send } = useFormSend(setError, INVITED);
  const join = (values: InvitationAcceptForm) =>
    send(async () => {
      await apiSend("POST", "/api/invitations/accept", values);
      window.location.assign("/sign-in?remark=joined");
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(join)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      {formState.errors.token ? <Notice tone="trouble">{formState.errors.token.message}</Notice> : null}
      <TextField
        label="Your name"
        hint="Printed where you draw, check or weld."
        autoComplete="name"
        error={formState.errors.name?.message}
        {...register("name")}
      />
      <TextField
        label="Password"
        hint="At least 12 characters. If you have a Quarterline password already, enter that one."
        type="password"
        autoComplete="new-password"
        error={formState.errors.password?.message}
        {...register("password")}
      />
      <Button
        type="submit"
        tone="primary"
        className="w-full"
        busy={formState.isSubmitting}
        busyLabel="Joining"
      >
        Join the shop
      </Button>
    </form>
  );
}
