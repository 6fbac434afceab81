import { beforeEach, expect, test } from "vitest";
import { tooMany } from "~/auth/attempts.server";
import { auth } from "~/auth/auth.server";
import { currentPerson } from "~/auth/session.server";
import { db } from "~/db/client.server";
import { accounts, outbox, sessions, users } from "~/db/schema";
import { signUp } from "~/flows/sign-up.server";
import { sendDueMails } from "~/jobs/outbox.server";
import { resetDatabase } from "../../support/database";
import { freshScene } from "../../support/scene";
import { argsFor, cookieOf, linkMailedTo, requestTo } from "./asking";

const running = freshScene();
beforeEach(async () => {
  await resetDatabase();
  running.fakes.mail.clear();
});

const ANN = { name: "Ann Builder", email: "ann@kerfpost.example", password: "a plank and a plane" };

async function personBehind(cookie: string | undefined) {
  const { context } = await argsFor("/", cookie ? { cookie } : {});
  return currentPerson(context);
}

test("sign-up, mail, confirmation, sign-in", async () => {
  expect(await signUp({ ...ANN, email: "Ann@Kerfpost.example" })).toMatchObject({ ok: true });
  await sendDueMails();
  const [mail] = running.fakes.mail.messages(ANN.email);
  expect(mail).toMatchObject({ subject: "Confirm your e-mail address" });
  expect(mail?.html).toContain("Confirm my address");

  const cookie = await cookieOf(ANN.email, ANN.password);
  expect(await personBehind(cookie)).toMatchObject({
    name: ANN.name,
    email: ANN.email,
    roles: ["builder"],
    emailVerified: false,
  });

  const link = await linkMailedTo(ANN.email, "verification");
  expect(link.pathname).toBe("/verify-email");
  const token = link.searchParams.get("token") ?? "";
  await auth().api.verifyEmail({ query: { token } });
  await auth().api.verifyEmail({ query: { token } });
  expect(await personBehind(cookie)).toMatchObject({ emailVerified: true });
});

test("a confirmation with a forged signature confirms nothing", async () => {
  await signUp(ANN);
  const token = (await linkMailedTo(ANN.email, "verification")).searchParams.get("token") ?? "";
  const forged = `${token.slice(0, -4)}AAAA`;
  await expect(auth().api.verifyEmail({ query: { token: forged } })).rejects.toThrow();
  expect(await db.select().from(users)).toMatchObject([{ emailVerified: false }]);
});

test("an address has one account, and a second sign-up changes and mails nothing", async () => {
  await signUp(ANN);
  const again = await signUp({ ...ANN, name: "Mallory", password: "something else entirely" });
  expect(again).toMatchObject({ ok: false, reason: "changed" });
  expect(await db.select().from(users)).toMatchObject([{ name: ANN.name }]);
  expect(await db.select().from(accounts)).toHaveLength(1);
  expect(await db.select().from(outbox)).toHaveLength(1);
  expect(await cookieOf(ANN.email, "something else entirely")).toBeUndefined();
});

test("a wrong password, and an address without an account, begin no session", async () => {
  await signUp(ANN);
  expect(await cookieOf(ANN.email, "a plank and a chisel")).toBeUndefined();
  expect(await cookieOf("nobody@kerfpost.example", ANN.password)).toBeUndefined();
  expect(await db.select().from(sessions)).toEqual([]);
});

test("a password is kept only as its hash, a session's cookie is signed", async () => {
  await signUp(ANN);
  const [account] = await db.select().from(accounts);
  expect(account?.password).not.toContain(ANN.password);
  const cookie = await cookieOf(ANN.email, ANN.password);
  const [session] = await db.select().from(sessions);
  expect(await personBehind(`kerfpost.session_token=${session?.token}.c2lnbmF0dXJl`)).toBeNull();
  expect(await personBehind(cookie)).not.toBeNull();
});

test("a new password by mail works once, and ends every session", async () => {
  await signUp(ANN);
  const cookie = await cookieOf(ANN.email, ANN.password);
  await cookieOf(ANN.email, ANN.password);
  await auth().api.requestPasswordReset({ body: { email: ANN.email } });
  const link = await linkMailedTo(ANN.email, "reset");
  expect(link.pathname).toBe("/reset-password");
  const token = link.searchParams.get("token") ?? "";
  const newPassword = "two planks and a plane";
  await auth().api.resetPassword({ body: { token, newPassword } });

  expect(await personBehind(cookie)).toBeNull();
  expect(await db.select().from(sessions)).toEqual([]);
  expect(await cookieOf(ANN.email, ANN.password)).toBeUndefined();
  expect(await personBehind(await cookieOf(ANN.email, newPassword))).toMatchObject({ email: ANN.email });
  await expect(auth().api.resetPassword({ body: { token, newPassword: ANN.password } })).rejects.toThrow();
});

test("a forgotten password of nobody mails nobody", async () => {
  await auth().api.requestPasswordReset({ body: { email: "nobody@kerfpost.example" } });
  expect(await db.select().from(outbox)).toEqual([]);
});

test("sign-ins to one account are limited, from whichever place they come", async () => {
  const tryFrom = (from: string) => tooMany("sign-in", requestTo("/sign-in", { from }), ANN.email);
  for (let attempt = 0; attempt < 10; attempt++) expect(await tryFrom(`192.0.2.${attempt}`)).toBeNull();
  expect(await tryFrom("192.0.2.99")).toMatch(/^Too many tries\. Wait 10 minutes/);
  expect(await tooMany("sign-in", requestTo("/sign-in"), "bob@kerfpost.example")).toBeNull();
});

test("sign-ins from one place are limited, to whichever account they go", async () => {
  const tryTo = (email: string) => tooMany("sign-in", requestTo("/sign-in"), email);
  for (let attempt = 0; attempt < 40; attempt++)
    expect(await tryTo(`p${attempt}@kerfpost.example`)).toBeNull();
  expect(await tryTo("ann@kerfpost.example")).toMatch(/^Too many tries/);
});

test("a session in use is prolonged once a day, and its cookie with it", async () => {
  await signUp(ANN);
  const cookie = (await cookieOf(ANN.email, ANN.password)) ?? "";
  expect((await argsFor("/", { cookie })).replied.headers.getSetCookie()).toEqual([]);
  const DAY = 86_400_000;
  const beforeToday = new Date(Date.now() + 28 * DAY);
  await db.update(sessions).set({ expiresAt: beforeToday });
  const { replied } = await argsFor("/", { cookie, asked: true });
  expect(replied.headers.getSetCookie().join()).toMatch(/^kerfpost\.session_token=.+Max-Age=2592000/);
  const [session] = await db.select().from(sessions);
  expect(session?.expiresAt.getTime()).toBeGreaterThan(Date.now() + 29 * DAY);
});
