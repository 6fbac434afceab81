ALTER TABLE `outbox` ADD `resend_of` text;--> statement-breakpoint
CREATE INDEX `outbox_order` ON `outbox` (`order_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `outbox_time` ON `outbox` (`created_at`);--> statement-breakpoint
CREATE INDEX `outbox_resend` ON `outbox` (`resend_of`);