import { beforeEach, expect, test } from "vitest";
import { currentPerson } from "~/auth/session.server";
import { db } from "~/db/client.server";
import { auditEntries, invitations } from "~/db/schema";
import type { Role } from "~/domain/orders";
import { acceptInvitation } from "~/flows/accept-invitation.server";
import { changeRoles } from "~/flows/change-roles.server";
import { inviteStaff } from "~/flows/invite-staff.server";
import { revokeInvitations } from "~/models/invitations.server";
import { listRoles } from "~/models/user-roles.server";
import { freshDatabase, resetDatabase } from "../../support/database";
import { makePerson } from "../../support/scene";
import { argsFor, cookieOf, linkMailedTo } from "./asking";

freshDatabase();
beforeEach(resetDatabase);

const EMAIL = "olin@kerfpost.example";
const PASSWORD = "sharp bits only";
const DAY = 86_400_000;

async function invited(roles: readonly Role[] = ["operator", "clerk"], email = EMAIL) {
  const owner = await makePerson({ roles: ["owner"] });
  expect(await inviteStaff({ actor: owner, email, roles })).toMatchObject({ ok: true });
  const link = await linkMailedTo(email, "invitation");
  expect(link.pathname).toMatch(/^\/invitation\/[\w-]{43}$/);
  return { owner, token: link.pathname.split("/").at(-1) ?? "" };
}
const asNew = { name: "Olin Router", password: PASSWORD };
const rolesOf = async (userId: string) => (await listRoles(db, userId)).roles.toSorted();

test("an invitation makes an account with its roles and a confirmed address, once", async () => {
  const { owner, token } = await invited();
  expect(await acceptInvitation({ token, as: asNew })).toEqual({ ok: true, email: EMAIL });
  const { context } = await argsFor("/", { cookie: (await cookieOf(EMAIL, PASSWORD)) ?? "" });
  const person = await currentPerson(context);
  expect(person).toMatchObject({ name: asNew.name, emailVerified: true });
  expect(person?.roles.toSorted()).toEqual(["clerk", "operator"]);
  expect(await acceptInvitation({ token, as: asNew })).toMatchObject({ ok: false, reason: "expired" });
  expect((await db.select().from(auditEntries)).map(({ act, actorId }) => ({ act, actorId }))).toEqual([
    { act: "staff.invite", actorId: owner.id },
    { act: "staff.accept", actorId: person?.id },
  ]);
});

test("only the hash of the token is kept", async () => {
  const { token } = await invited();
  expect(JSON.stringify(await db.select().from(invitations))).not.toContain(token);
});

test("an invitation runs out after seven days", async () => {
  const { token } = await invited();
  const after = (days: number) => new Date(Date.now() + days * DAY);
  expect(await acceptInvitation({ token, as: asNew, now: after(7.01) })).toMatchObject({ reason: "expired" });
  expect(await acceptInvitation({ token, as: asNew, now: after(6.99) })).toMatchObject({ ok: true });
});

test("a called-back invitation, one that a newer replaced, and an invented one are worth nothing", async () => {
  const { owner, token: older } = await invited();
  await inviteStaff({ actor: owner, email: EMAIL.toUpperCase(), roles: ["clerk"] });
  expect(await acceptInvitation({ token: older, as: asNew })).toMatchObject({ reason: "expired" });
  const newer = (await linkMailedTo(EMAIL, "invitation")).pathname.split("/").at(-1) ?? "";
  expect(newer).not.toBe(older);
  expect(await revokeInvitations(db, { email: EMAIL }, new Date())).toBe(1);
  expect(await acceptInvitation({ token: newer, as: asNew })).toMatchObject({ reason: "expired" });
  expect(await acceptInvitation({ token: "A".repeat(43), as: asNew })).toMatchObject({ reason: "expired" });
});

test("who has an account takes the roles on top of their own, when it is theirs", async () => {
  const builder = await makePerson({ roles: ["builder"], email: EMAIL, emailVerified: false });
  const other = await makePerson();
  const { token } = await invited(["clerk"]);
  const asOther = { userId: other.id, email: other.email };
  expect(await acceptInvitation({ token, as: asOther })).toMatchObject({ ok: false, reason: "not-allowed" });
  expect(await acceptInvitation({ token, as: asNew })).toMatchObject({ ok: false, reason: "changed" });
  expect(await rolesOf(other.id)).toEqual(["builder"]);
  expect(await rolesOf(builder.id)).toEqual(["builder"]);
  expect(await acceptInvitation({ token, as: { userId: builder.id, email: EMAIL } })).toMatchObject({
    ok: true,
  });
  expect(await rolesOf(builder.id)).toEqual(["builder", "clerk"]);
});

test.each<Role[][]>([[["operator"]], [["clerk"]], [["builder"]], [["operator", "clerk", "builder"]], [[]]])(
  "%j neither invites nor changes roles",
  async (roles) => {
    const actor = await makePerson({ roles });
    const colleague = await makePerson({ roles: ["clerk"] });
    expect(await inviteStaff({ actor, email: EMAIL, roles: ["clerk"] })).toMatchObject({
      reason: "not-allowed",
    });
    expect(await changeRoles({ actor, userId: colleague.id, roles: [] })).toMatchObject({
      reason: "not-allowed",
    });
    expect(await rolesOf(colleague.id)).toEqual(["clerk"]);
  },
);

test("nobody is invited as a builder or as nothing", async () => {
  const actor = await makePerson({ roles: ["owner"] });
  for (const roles of [[], ["builder"], ["clerk", "builder"]] satisfies Role[][])
    expect(await inviteStaff({ actor, email: EMAIL, roles })).toMatchObject({ reason: "invalid" });
  expect(await db.select().from(invitations)).toEqual([]);
});

test("the owner gives and takes roles; a builder's own role stays", async () => {
  const actor = await makePerson({ roles: ["owner"] });
  const colleague = await makePerson({ roles: ["builder", "clerk"] });
  expect(await changeRoles({ actor, userId: colleague.id, roles: ["operator"] })).toEqual({ ok: true });
  expect(await rolesOf(colleague.id)).toEqual(["builder", "operator"]);
  expect(await changeRoles({ actor, userId: colleague.id, roles: [] })).toEqual({ ok: true });
  expect(await rolesOf(colleague.id)).toEqual(["builder"]);
  expect(await changeRoles({ actor, userId: colleague.id, roles: ["owner"] })).toMatchObject({
    reason: "not-found",
  });
  expect((await db.select().from(auditEntries)).map(({ detail }) => detail)).toEqual([
    { given: ["operator"], taken: ["clerk"] },
    { given: [], taken: ["operator"] },
  ]);
});

test("the last owner stays owner, also when two stop at once", async () => {
  const one = await makePerson({ roles: ["owner", "operator"] });
  expect(await changeRoles({ actor: one, userId: one.id, roles: ["operator"] })).toMatchObject({
    ok: false,
    reason: "invalid",
  });
  expect(await rolesOf(one.id)).toEqual(["operator", "owner"]);
  const two = await makePerson({ roles: ["owner"] });
  const stopped = await Promise.all([
    changeRoles({ actor: one, userId: one.id, roles: ["operator"] }),
    changeRoles({ actor: two, userId: two.id, roles: [] }),
  ]);
  expect(stopped.map(({ ok }) => ok).toSorted()).toEqual([false, true]);
});
