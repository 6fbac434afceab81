import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Role } from "~/domain/orders";
import type { LengthUnit } from "~/domain/units";
import { newId } from "../new-id";
import { createdAt, flag, id, instant } from "./columns";

export const users = sqliteTable("users", {
  id: text().primaryKey().$defaultFn(newId),
  name: text().notNull(),
  email: text().notNull().unique(),
  emailVerified: flag().notNull().default(false),
  image: text(),
  /** The viewer's choice for reading lengths. */
  shownUnit: text().$type<Extract<LengthUnit, "mm" | "in">>().notNull().default("mm"),
  taxExempt: flag().notNull().default(false),
  /** Mails the person turned off; the necessary ones (verification, receipts, shortages) are always sent. */
  mutedMails: text({ mode: "json" }).$type<string[]>().notNull().default([]),
  createdAt: createdAt(),
  updatedAt: createdAt(),
});

export const sessions = sqliteTable(
  "sessions",
  {
    id: text().primaryKey().$defaultFn(newId),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    token: text().notNull().unique(),
    expiresAt: instant().notNull(),
    ipAddress: text(),
    userAgent: text(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [index("sessions_user").on(table.userId)],
);

export const accounts = sqliteTable(
  "accounts",
  {
    id: text().primaryKey().$defaultFn(newId),
    accountId: text().notNull(),
    providerId: text().notNull(),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    accessToken: text(),
    refreshToken: text(),
    idToken: text(),
    accessTokenExpiresAt: instant(),
    refreshTokenExpiresAt: instant(),
    scope: text(),
    password: text(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [index("accounts_user").on(table.userId)],
);

export const verifications = sqliteTable(
  "verifications",
  {
    id: text().primaryKey().$defaultFn(newId),
    identifier: text().notNull(),
    value: text().notNull(),
    expiresAt: instant().notNull(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [index("verifications_identifier").on(table.identifier)],
);

/** Shared counters, so that limits hold across processes. */
export const rateLimits = sqliteTable("rate_limits", {
  id: text().primaryKey().$defaultFn(newId),
  key: text().notNull().unique(),
  count: integer().notNull(),
  lastRequest: integer().notNull(),
});

export const userRoles = sqliteTable(
  "user_roles",
  {
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    role: text().$type<Role>().notNull(),
    grantedBy: text(),
    createdAt: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.userId, table.role] })],
);

export const invitations = sqliteTable("invitations", {
  id: id(),
  email: text().notNull(),
  roles: text({ mode: "json" }).$type<Role[]>().notNull(),
  /** SHA-256 of the token in the mailed link. */
  tokenHash: text().notNull().unique(),
  invitedBy: text()
    .notNull()
    .references(() => users.id),
  expiresAt: instant().notNull(),
  acceptedAt: instant(),
  revokedAt: instant(),
  createdAt: createdAt(),
});

export const addresses = sqliteTable(
  "addresses",
  {
    id: id(),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    recipient: text().notNull(),
    company: text(),
    line1: text().notNull(),
    line2: text(),
    city: text().notNull(),
    region: text().notNull(),
    postcode: text().notNull(),
    country: text().notNull().default("US"),
    phone: text(),
    residential: flag().notNull().default(true),
    createdAt: createdAt(),
    removedAt: instant(),
  },
  (table) => [index("addresses_user").on(table.userId)],
);

export const apiKeys = sqliteTable(
  "api_keys",
  {
    id: id(),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    name: text().notNull(),
    /** First characters, shown so that a key can be recognised. */
    prefix: text().notNull(),
    keyHash: text().notNull(),
    scopes: text({ mode: "json" }).$type<string[]>().notNull(),
    lastUsedAt: instant(),
    revokedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex("api_keys_hash").on(table.keyHash), index("api_keys_user").on(table.userId)],
);

/** What staff did to things other than an order's stage; append-only. */
export const auditEntries = sqliteTable(
  "audit_entries",
  {
    id: id(),
    actorId: text(),
    act: text().notNull(),
    subjectKind: text().notNull(),
    subjectId: text().notNull(),
    detail: text({ mode: "json" }).$type<Record<string, unknown>>().notNull().default({}),
    createdAt: createdAt(),
  },
  (table) => [
    index("audit_entries_subject").on(table.subjectKind, table.subjectId),
    index("audit_entries_time").on(table.createdAt),
  ],
);
