import { auth } from "~/auth/auth.server";
import { db, transact } from "~/db/client.server";
import { DEMO_PASSWORD, DEMO_PEOPLE, type DemoPerson, type DemoPersonName } from "~/db/seed/people";
import type { Role } from "~/domain/orders";
import { signUp } from "~/flows/sign-up.server";
import { addAddress } from "~/models/addresses.server";
import { newestMailTo } from "~/models/outbox.server";
import { markTaxExempt, setShownUnit } from "~/models/people.server";
import { grantRole, revokeRole } from "~/models/user-roles.server";

export interface SeededPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly emailVerified: true;
  readonly roles: readonly Role[];
}
export type SeededPeople = Readonly<Record<DemoPersonName, SeededPerson>>;

/** Signs everybody up as they would themselves, confirms their address by the mailed link, gives staff their roles. */
export async function seedPeople(): Promise<SeededPeople> {
  const people = new Map<string, SeededPerson>();
  for (const [key, demo] of Object.entries(DEMO_PEOPLE)) people.set(key, await signUpDemo(demo));
  return Object.fromEntries(people) as SeededPeople;
}

async function signUpDemo(demo: DemoPerson): Promise<SeededPerson> {
  const { name, email, roles } = demo;
  const signed = await signUp({ name, email, password: DEMO_PASSWORD });
  if (!signed.ok) throw new Error(`${email}: ${signed.words}`);
  const { userId } = signed;
  const mail = await newestMailTo(db, email, "verification");
  const token = /[?&]token=([^\s&]+)/.exec(mail?.payload.text ?? "")?.[1];
  if (!token) throw new Error(`No confirmation was mailed to ${email}.`);
  await auth().api.verifyEmail({ query: { token: decodeURIComponent(token) } });
  await transact(async (tx) => {
    for (const role of roles) await grantRole(tx, { userId: userId, role, grantedBy: null });
    if (!roles.includes("builder")) await revokeRole(tx, userId, "builder");
    await setShownUnit(tx, userId, demo.shownUnit);
    if (demo.taxExempt) await markTaxExempt(tx, userId);
    for (const address of demo.addresses) await addAddress(tx, userId, address);
  });
  return { id: userId, name, email, emailVerified: true, roles };
}
