CREATE TABLE `drawing_files` (
	`sha256` text PRIMARY KEY NOT NULL,
	`size` integer NOT NULL,
	`created_at` integer NOT NULL,
	`erased_at` integer
);
--> statement-breakpoint
CREATE TABLE `finding_answers` (
	`id` text PRIMARY KEY NOT NULL,
	`finding_id` text NOT NULL,
	`answer` text NOT NULL,
	`note` text,
	`answered_by` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`finding_id`) REFERENCES `findings`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`answered_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `finding_answers_finding` ON `finding_answers` (`finding_id`);--> statement-breakpoint
CREATE TABLE `findings` (
	`id` text PRIMARY KEY NOT NULL,
	`revision_id` text NOT NULL,
	`position` integer NOT NULL,
	`severity` text NOT NULL,
	`code` text NOT NULL,
	`content` text NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `findings_revision` ON `findings` (`revision_id`);--> statement-breakpoint
CREATE TABLE `interpretations` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`number` integer NOT NULL,
	`content` text NOT NULL,
	`geometry_key` text,
	`created_by` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `interpretations_order_number` ON `interpretations` (`order_id`,`number`);--> statement-breakpoint
CREATE TABLE `order_drawings` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`file_sha` text NOT NULL,
	`file_name` text NOT NULL,
	`position` integer NOT NULL,
	`uploaded_by` text,
	`created_at` integer NOT NULL,
	`removed_at` integer,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`file_sha`) REFERENCES `drawing_files`(`sha256`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`uploaded_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `order_drawings_order` ON `order_drawings` (`order_id`);--> statement-breakpoint
CREATE INDEX `order_drawings_file` ON `order_drawings` (`file_sha`);--> statement-breakpoint
CREATE TABLE `parts` (
	`id` text PRIMARY KEY NOT NULL,
	`revision_id` text NOT NULL,
	`stock_group_id` text NOT NULL,
	`position` integer NOT NULL,
	`file_sha` text NOT NULL,
	`letter` text NOT NULL,
	`label` text NOT NULL,
	`name` text NOT NULL,
	`quantity` integer NOT NULL,
	`mirror_of` text,
	`width` real NOT NULL,
	`height` real NOT NULL,
	`outer_length` real NOT NULL,
	`inner_length` real NOT NULL,
	`area` real NOT NULL,
	`gross_area` real NOT NULL,
	`holes` integer NOT NULL,
	`grain` text NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`stock_group_id`) REFERENCES `stock_groups`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `parts_revision` ON `parts` (`revision_id`);--> statement-breakpoint
CREATE TABLE `readings` (
	`id` text PRIMARY KEY NOT NULL,
	`file_sha` text NOT NULL,
	`reader_version` text NOT NULL,
	`status` text NOT NULL,
	`summary` text,
	`drawing_key` text,
	`failure` text,
	`created_at` integer NOT NULL,
	`finished_at` integer,
	FOREIGN KEY (`file_sha`) REFERENCES `drawing_files`(`sha256`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `readings_file_reader` ON `readings` (`file_sha`,`reader_version`);--> statement-breakpoint
CREATE TABLE `remembered_layers` (
	`user_id` text NOT NULL,
	`layer` text NOT NULL,
	`rule` text NOT NULL,
	`confirmed` integer DEFAULT true NOT NULL,
	`updated_at` integer NOT NULL,
	PRIMARY KEY(`user_id`, `layer`),
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `revisions` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`number` integer NOT NULL,
	`interpretation_id` text NOT NULL,
	`files` text NOT NULL,
	`geometry_key` text NOT NULL,
	`derived_from` text,
	`derivation` text,
	`frozen_by` text,
	`frozen_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`interpretation_id`) REFERENCES `interpretations`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `revisions_order_number` ON `revisions` (`order_id`,`number`);--> statement-breakpoint
CREATE TABLE `nest_sheets` (
	`id` text PRIMARY KEY NOT NULL,
	`nest_id` text NOT NULL,
	`number` integer NOT NULL,
	`length` real NOT NULL,
	`width` real NOT NULL,
	`yield` real NOT NULL,
	`estimated_minutes` real NOT NULL,
	`status` text DEFAULT 'planned' NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`nest_id`) REFERENCES `nests`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `nest_sheets_number` ON `nest_sheets` (`nest_id`,`number`);--> statement-breakpoint
CREATE TABLE `nests` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`material_id` text NOT NULL,
	`lot_id` text,
	`status` text NOT NULL,
	`spacing` real NOT NULL,
	`margin` real NOT NULL,
	`seed` integer NOT NULL,
	`locked_by` text,
	`locked_at` integer,
	`version` integer DEFAULT 1 NOT NULL,
	`created_by` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `nests_number_unique` ON `nests` (`number`);--> statement-breakpoint
CREATE INDEX `nests_status` ON `nests` (`status`);--> statement-breakpoint
CREATE TABLE `placements` (
	`id` text PRIMARY KEY NOT NULL,
	`sheet_id` text NOT NULL,
	`piece_id` text NOT NULL,
	`x` real NOT NULL,
	`y` real NOT NULL,
	`turn_degrees` real NOT NULL,
	`released_at` integer,
	FOREIGN KEY (`sheet_id`) REFERENCES `nest_sheets`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`piece_id`) REFERENCES `pieces`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `placements_sheet` ON `placements` (`sheet_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `placements_piece` ON `placements` (`piece_id`) WHERE "placements"."released_at" is null;--> statement-breakpoint
CREATE TABLE `runs` (
	`id` text PRIMARY KEY NOT NULL,
	`sheet_id` text NOT NULL,
	`machine_id` text NOT NULL,
	`day` text NOT NULL,
	`sequence` integer NOT NULL,
	`planned_minutes` real NOT NULL,
	`started_at` integer,
	`finished_at` integer,
	`actual_minutes` real,
	`started_by` text,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`sheet_id`) REFERENCES `nest_sheets`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`machine_id`) REFERENCES `machines`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `runs_sheet` ON `runs` (`sheet_id`);--> statement-breakpoint
CREATE INDEX `runs_day` ON `runs` (`machine_id`,`day`);--> statement-breakpoint
CREATE TABLE `checkouts` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`quote_id` text NOT NULL,
	`purpose` text NOT NULL,
	`amount` integer NOT NULL,
	`currency` text NOT NULL,
	`status` text NOT NULL,
	`session_id` text,
	`payment_intent` text,
	`url` text,
	`last_failure` text,
	`expires_at` integer,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`quote_id`) REFERENCES `quotes`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `checkouts_one_open` ON `checkouts` (`order_id`) WHERE "checkouts"."status" = 'open';--> statement-breakpoint
CREATE UNIQUE INDEX `checkouts_session` ON `checkouts` (`session_id`);--> statement-breakpoint
CREATE INDEX `checkouts_intent` ON `checkouts` (`payment_intent`);--> statement-breakpoint
CREATE TABLE `ledger_entries` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`kind` text NOT NULL,
	`amount` integer NOT NULL,
	`currency` text NOT NULL,
	`quote_id` text,
	`checkout_id` text,
	`external_id` text,
	`note` text,
	`actor_id` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `ledger_entries_order` ON `ledger_entries` (`order_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `ledger_entries_external` ON `ledger_entries` (`kind`,`external_id`);--> statement-breakpoint
CREATE TABLE `payment_events` (
	`id` text PRIMARY KEY NOT NULL,
	`type` text NOT NULL,
	`object_id` text NOT NULL,
	`payload` text NOT NULL,
	`received_at` integer NOT NULL,
	`applied_at` integer,
	`outcome` text,
	`attempts` integer DEFAULT 0 NOT NULL
);
--> statement-breakpoint
CREATE TABLE `quote_lines` (
	`id` text PRIMARY KEY NOT NULL,
	`quote_id` text NOT NULL,
	`position` integer NOT NULL,
	`kind` text NOT NULL,
	`label` text NOT NULL,
	`how` text NOT NULL,
	`amount` integer NOT NULL,
	`taxable` integer NOT NULL,
	FOREIGN KEY (`quote_id`) REFERENCES `quotes`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `quote_lines_quote` ON `quote_lines` (`quote_id`);--> statement-breakpoint
CREATE TABLE `quotes` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`number` integer NOT NULL,
	`revision_id` text NOT NULL,
	`price_book_version_id` text NOT NULL,
	`facts` text NOT NULL,
	`currency` text NOT NULL,
	`net` integer NOT NULL,
	`tax` integer NOT NULL,
	`total` integer NOT NULL,
	`machine_minutes` real NOT NULL,
	`promised_for` integer NOT NULL,
	`status` text NOT NULL,
	`expires_at` integer NOT NULL,
	`accepted_at` integer,
	`accepted_by` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`price_book_version_id`) REFERENCES `price_book_versions`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `quotes_order_number` ON `quotes` (`order_id`,`number`);--> statement-breakpoint
CREATE TABLE `refunds` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`checkout_id` text NOT NULL,
	`amount` integer NOT NULL,
	`reason` text NOT NULL,
	`status` text NOT NULL,
	`external_id` text,
	`asked_by` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`checkout_id`) REFERENCES `checkouts`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `refunds_order` ON `refunds` (`order_id`);--> statement-breakpoint
CREATE TABLE `order_numbers` (
	`id` text PRIMARY KEY DEFAULT 'orders' NOT NULL,
	`next` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `orders` (
	`id` text PRIMARY KEY NOT NULL,
	`reference` text NOT NULL,
	`builder_id` text NOT NULL,
	`name` text NOT NULL,
	`stage` text NOT NULL,
	`held_from` text,
	`hold_reason` text,
	`delivery` text,
	`ship_to` text,
	`review_asked` integer DEFAULT false NOT NULL,
	`reviewed_at` integer,
	`reviewed_by` text,
	`trial` integer DEFAULT false NOT NULL,
	`parent_order_id` text,
	`revision_id` text,
	`quote_id` text,
	`promised_for` integer,
	`paid_at` integer,
	`shipped_at` integer,
	`cancelled_at` integer,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`builder_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `orders_reference_unique` ON `orders` (`reference`);--> statement-breakpoint
CREATE INDEX `orders_builder` ON `orders` (`builder_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `orders_stage` ON `orders` (`stage`,`promised_for`);--> statement-breakpoint
CREATE INDEX `orders_parent` ON `orders` (`parent_order_id`);--> statement-breakpoint
CREATE TABLE `pieces` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`part_id` text NOT NULL,
	`stock_group_id` text NOT NULL,
	`number` integer NOT NULL,
	`of` integer NOT NULL,
	`stage` text NOT NULL,
	`state` text DEFAULT 'good' NOT NULL,
	`remake_of` text,
	`cause` text,
	`payer` text,
	`code` text NOT NULL,
	`parcel_id` text,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`stock_group_id`) REFERENCES `stock_groups`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `pieces_code_unique` ON `pieces` (`code`);--> statement-breakpoint
CREATE INDEX `pieces_order` ON `pieces` (`order_id`);--> statement-breakpoint
CREATE INDEX `pieces_stage` ON `pieces` (`stage`);--> statement-breakpoint
CREATE INDEX `pieces_part` ON `pieces` (`part_id`);--> statement-breakpoint
CREATE INDEX `pieces_group` ON `pieces` (`stock_group_id`);--> statement-breakpoint
CREATE TABLE `stage_moves` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`piece_ids` text,
	`from` text NOT NULL,
	`to` text NOT NULL,
	`act` text NOT NULL,
	`actor_id` text,
	`actor_role` text NOT NULL,
	`reason` text,
	`undoes` text,
	`request_id` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `stage_moves_order` ON `stage_moves` (`order_id`,`created_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `stage_moves_request` ON `stage_moves` (`order_id`,`request_id`);--> statement-breakpoint
CREATE TABLE `stock_groups` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`material_id` text NOT NULL,
	`lot_id` text,
	`sheets` real NOT NULL,
	`reserved_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `stock_groups_order` ON `stock_groups` (`order_id`);--> statement-breakpoint
CREATE INDEX `stock_groups_lot` ON `stock_groups` (`lot_id`);--> statement-breakpoint
CREATE TABLE `accounts` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`provider_id` text NOT NULL,
	`user_id` text NOT NULL,
	`access_token` text,
	`refresh_token` text,
	`id_token` text,
	`access_token_expires_at` integer,
	`refresh_token_expires_at` integer,
	`scope` text,
	`password` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `accounts_user` ON `accounts` (`user_id`);--> statement-breakpoint
CREATE TABLE `addresses` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`recipient` text NOT NULL,
	`company` text,
	`line1` text NOT NULL,
	`line2` text,
	`city` text NOT NULL,
	`region` text NOT NULL,
	`postcode` text NOT NULL,
	`country` text DEFAULT 'US' NOT NULL,
	`phone` text,
	`residential` integer DEFAULT true NOT NULL,
	`created_at` integer NOT NULL,
	`removed_at` integer,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `addresses_user` ON `addresses` (`user_id`);--> statement-breakpoint
CREATE TABLE `api_keys` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`name` text NOT NULL,
	`prefix` text NOT NULL,
	`key_hash` text NOT NULL,
	`scopes` text NOT NULL,
	`last_used_at` integer,
	`revoked_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `api_keys_hash` ON `api_keys` (`key_hash`);--> statement-breakpoint
CREATE INDEX `api_keys_user` ON `api_keys` (`user_id`);--> statement-breakpoint
CREATE TABLE `audit_entries` (
	`id` text PRIMARY KEY NOT NULL,
	`actor_id` text,
	`act` text NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text NOT NULL,
	`detail` text DEFAULT '{}' NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `audit_entries_subject` ON `audit_entries` (`subject_kind`,`subject_id`);--> statement-breakpoint
CREATE INDEX `audit_entries_time` ON `audit_entries` (`created_at`);--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`roles` text NOT NULL,
	`token_hash` text NOT NULL,
	`invited_by` text NOT NULL,
	`expires_at` integer NOT NULL,
	`accepted_at` integer,
	`revoked_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`invited_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitations_tokenHash_unique` ON `invitations` (`token_hash`);--> statement-breakpoint
CREATE TABLE `rate_limits` (
	`id` text PRIMARY KEY NOT NULL,
	`key` text NOT NULL,
	`count` integer NOT NULL,
	`last_request` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `rate_limits_key_unique` ON `rate_limits` (`key`);--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`token` text NOT NULL,
	`expires_at` integer NOT NULL,
	`ip_address` text,
	`user_agent` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_token_unique` ON `sessions` (`token`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE TABLE `user_roles` (
	`user_id` text NOT NULL,
	`role` text NOT NULL,
	`granted_by` text,
	`created_at` integer NOT NULL,
	PRIMARY KEY(`user_id`, `role`),
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`email_verified` integer DEFAULT false NOT NULL,
	`image` text,
	`shown_unit` text DEFAULT 'mm' NOT NULL,
	`tax_exempt` integer DEFAULT false NOT NULL,
	`muted_mails` text DEFAULT '[]' NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email_unique` ON `users` (`email`);--> statement-breakpoint
CREATE TABLE `verifications` (
	`id` text PRIMARY KEY NOT NULL,
	`identifier` text NOT NULL,
	`value` text NOT NULL,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `verifications_identifier` ON `verifications` (`identifier`);--> statement-breakpoint
CREATE TABLE `labels` (
	`id` text PRIMARY KEY NOT NULL,
	`parcel_id` text NOT NULL,
	`carrier_label_id` text NOT NULL,
	`service` text NOT NULL,
	`tracking_number` text NOT NULL,
	`price` integer NOT NULL,
	`status` text NOT NULL,
	`bought_by` text,
	`created_at` integer NOT NULL,
	`voided_at` integer,
	FOREIGN KEY (`parcel_id`) REFERENCES `parcels`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `labels_carrierLabelId_unique` ON `labels` (`carrier_label_id`);--> statement-breakpoint
CREATE INDEX `labels_parcel` ON `labels` (`parcel_id`);--> statement-breakpoint
CREATE TABLE `parcels` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`number` integer NOT NULL,
	`length` real NOT NULL,
	`width` real NOT NULL,
	`height` real NOT NULL,
	`weight` real NOT NULL,
	`packed_by` text,
	`packed_at` integer,
	`handed_over_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `parcels_number` ON `parcels` (`order_id`,`number`);--> statement-breakpoint
CREATE TABLE `lot_readings` (
	`id` text PRIMARY KEY NOT NULL,
	`lot_id` text NOT NULL,
	`sheet` integer NOT NULL,
	`position` text NOT NULL,
	`thickness` real NOT NULL,
	`measured_by` text,
	`measured_at` integer NOT NULL,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`measured_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `lot_readings_lot` ON `lot_readings` (`lot_id`);--> statement-breakpoint
CREATE TABLE `lots` (
	`id` text PRIMARY KEY NOT NULL,
	`material_id` text NOT NULL,
	`code` text NOT NULL,
	`supplier_lot` text,
	`supplier_document` text,
	`sheets_on_hand` integer NOT NULL,
	`sheets_reserved` integer DEFAULT 0 NOT NULL,
	`thickness_min` real NOT NULL,
	`thickness_mean` real NOT NULL,
	`thickness_max` real NOT NULL,
	`measured_at` integer NOT NULL,
	`active` integer DEFAULT true NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `lots_code_unique` ON `lots` (`code`);--> statement-breakpoint
CREATE INDEX `lots_material` ON `lots` (`material_id`);--> statement-breakpoint
CREATE TABLE `machines` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`bed_length` real NOT NULL,
	`bed_width` real NOT NULL,
	`rapid` real NOT NULL,
	`acceleration` real NOT NULL,
	`tool_change_minutes` real NOT NULL,
	`sheet_handling_minutes` real NOT NULL,
	`calibration` real DEFAULT 1 NOT NULL,
	`calendar` text NOT NULL,
	`active` integer DEFAULT true NOT NULL,
	`version` integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `machines_name_unique` ON `machines` (`name`);--> statement-breakpoint
CREATE TABLE `materials` (
	`id` text PRIMARY KEY NOT NULL,
	`code` text NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`nominal_thickness` real NOT NULL,
	`sheet_length` real NOT NULL,
	`sheet_width` real NOT NULL,
	`has_grain` integer DEFAULT true NOT NULL,
	`density` real NOT NULL,
	`sheet_price` integer NOT NULL,
	`active` integer DEFAULT true NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `materials_code_unique` ON `materials` (`code`);--> statement-breakpoint
CREATE TABLE `price_book_versions` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`content` text NOT NULL,
	`note` text,
	`status` text NOT NULL,
	`created_by` text,
	`created_at` integer NOT NULL,
	`published_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `price_book_versions_number` ON `price_book_versions` (`number`);--> statement-breakpoint
CREATE TABLE `settings` (
	`id` text PRIMARY KEY DEFAULT 'shop' NOT NULL,
	`content` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`updated_at` integer NOT NULL,
	`updated_by` text
);
--> statement-breakpoint
CREATE TABLE `tools` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`nominal_diameter` real NOT NULL,
	`measured_diameter` real NOT NULL,
	`measured_at` integer NOT NULL,
	`flutes` integer NOT NULL,
	`feed` real NOT NULL,
	`plunge` real NOT NULL,
	`rpm` integer NOT NULL,
	`max_pass_depth` real NOT NULL,
	`active` integer DEFAULT true NOT NULL,
	`version` integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `tools_number_unique` ON `tools` (`number`);--> statement-breakpoint
CREATE TABLE `attachments` (
	`id` text PRIMARY KEY NOT NULL,
	`message_id` text NOT NULL,
	`file_name` text NOT NULL,
	`content_type` text NOT NULL,
	`size` integer NOT NULL,
	`sha256` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`message_id`) REFERENCES `messages`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `attachments_message` ON `attachments` (`message_id`);--> statement-breakpoint
CREATE TABLE `messages` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`author_id` text NOT NULL,
	`side` text NOT NULL,
	`audience` text NOT NULL,
	`body` text NOT NULL,
	`part_label` text,
	`spot_x` real,
	`spot_y` real,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `messages_order` ON `messages` (`order_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `thread_reads` (
	`order_id` text NOT NULL,
	`user_id` text NOT NULL,
	`read_at` integer NOT NULL,
	PRIMARY KEY(`order_id`, `user_id`),
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `events` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`order_id` text NOT NULL,
	`kind` text NOT NULL,
	`audience` text DEFAULT 'both' NOT NULL,
	`data` text DEFAULT '{}' NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `events_order` ON `events` (`order_id`,`id`);--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`payload` text NOT NULL,
	`order_id` text,
	`status` text DEFAULT 'queued' NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`max_attempts` integer DEFAULT 3 NOT NULL,
	`fence` integer DEFAULT 0 NOT NULL,
	`leased_until` integer,
	`run_after` integer NOT NULL,
	`progress` real DEFAULT 0 NOT NULL,
	`step` text,
	`result` text,
	`error` text,
	`dedupe_key` text,
	`created_at` integer NOT NULL,
	`finished_at` integer
);
--> statement-breakpoint
CREATE INDEX `jobs_due` ON `jobs` (`status`,`run_after`);--> statement-breakpoint
CREATE UNIQUE INDEX `jobs_dedupe` ON `jobs` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `jobs_order` ON `jobs` (`order_id`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`recipient` text NOT NULL,
	`template` text NOT NULL,
	`payload` text NOT NULL,
	`order_id` text,
	`status` text DEFAULT 'pending' NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_attempt_at` integer NOT NULL,
	`leased_until` integer,
	`last_error` text,
	`dedupe_key` text,
	`sent_at` integer,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_dedupeKey_unique` ON `outbox` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`status`,`next_attempt_at`);