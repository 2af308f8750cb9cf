CREATE TABLE `attempt` (
	`delivery_id` integer NOT NULL,
	`n` integer NOT NULL,
	`started_at` integer NOT NULL,
	`ended_at` integer,
	`outcome` text,
	`phase` text,
	`code` integer,
	`reply` text,
	PRIMARY KEY(`delivery_id`, `n`),
	FOREIGN KEY (`delivery_id`) REFERENCES `delivery`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
DROP INDEX `delivery_mailing`;--> statement-breakpoint
DROP INDEX `delivery_due`;--> statement-breakpoint
CREATE INDEX `delivery_lease` ON `delivery` (`state`,`lease_until`);--> statement-breakpoint
CREATE INDEX `delivery_due` ON `delivery` (`mailing_id`,`state`,`next_at`,`id`);--> statement-breakpoint
ALTER TABLE `mailing` ADD `from_name` text;--> statement-breakpoint
ALTER TABLE `mailing` ADD `reply_to` text;--> statement-breakpoint
ALTER TABLE `mailing` ADD `unit_parts` text;--> statement-breakpoint
ALTER TABLE `mailing` ADD `finished_at` integer;