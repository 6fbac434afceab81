CREATE TABLE `collections` (
	`id` text PRIMARY KEY NOT NULL,
	`order_id` text NOT NULL,
	`name` text NOT NULL,
	`signature_key` text NOT NULL,
	`handed_by` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`order_id`) REFERENCES `orders`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `collections_order` ON `collections` (`order_id`);--> statement-breakpoint
ALTER TABLE `pieces` ADD `counted_at` integer;--> statement-breakpoint
ALTER TABLE `pieces` ADD `counted_by` text;