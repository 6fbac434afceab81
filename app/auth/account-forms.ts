/** Schemas of the forms of sign-in and account, shared by browser and server. */
import { z } from "zod";
import { STAFF_ROLES } from "~/domain/orders";
import { PASSWORD_MAX, PASSWORD_MIN } from "./password-rules";

const email = z.preprocess(
  (value) => (typeof value === "string" ? value.trim().toLowerCase() : value),
  z.email({
    error: ({ input }) =>
      input === undefined ? "Type your e-mail address" : "An address like ann@example.com",
  }),
);
const name = z
  .string({ error: "Type your name" })
  .trim()
  .min(1, "Type your name")
  .max(80, "At most 80 letters");
const password = z
  .string({ error: "Type your password" })
  .max(PASSWORD_MAX, `At most ${PASSWORD_MAX} letters`);
const newPassword = z
  .string({ error: `At least ${PASSWORD_MIN} letters` })
  .min(PASSWORD_MIN, `At least ${PASSWORD_MIN} letters`)
  .max(PASSWORD_MAX, `At most ${PASSWORD_MAX} letters`);

export const signInSchema = z.object({ email, password, to: z.string().optional() });
export const signUpSchema = z.object({ name, email, password: newPassword, to: z.string().optional() });
export const forgotPasswordSchema = z.object({ email });
export const resetPasswordSchema = z.object({ password: newPassword, token: z.string() });
export const acceptInvitationSchema = z.object({ name, password: newPassword });
export const profileSchema = z.object({ name, shownUnit: z.enum(["mm", "in"]) });
export const changePasswordSchema = z.object({ current: password, password: newPassword });
export const inviteSchema = z.object({
  email,
  roles: z.array(z.enum(STAFF_ROLES)).min(1, "Choose at least one role"),
});
export const rolesSchema = z.object({ userId: z.string(), roles: z.array(z.enum(STAFF_ROLES)) });
