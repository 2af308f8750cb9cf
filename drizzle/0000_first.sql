CREATE TABLE `account` (
	`user_id` text NOT NULL,
	`type` text NOT NULL,
	`provider` text NOT NULL,
	`provider_account_id` text NOT NULL,
	PRIMARY KEY(`provider`, `provider_account_id`),
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `delivery` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`mailing_id` text NOT NULL,
	`subscriber_id` text NOT NULL,
	`email_key` text NOT NULL,
	`state` text DEFAULT 'queued' NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`unknowns` integer DEFAULT 0 NOT NULL,
	`next_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`lease_owner` text,
	`lease_until` integer,
	`phase` text,
	`code` integer,
	`enhanced` text,
	`reply` text,
	`message_id` text NOT NULL,
	`accepted_at` integer,
	FOREIGN KEY (`mailing_id`) REFERENCES `mailing`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`subscriber_id`) REFERENCES `subscriber`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `delivery_message_id_unique` ON `delivery` (`message_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `delivery_once` ON `delivery` (`mailing_id`,`email_key`);--> statement-breakpoint
CREATE INDEX `delivery_due` ON `delivery` (`state`,`next_at`,`id`);--> statement-breakpoint
CREATE INDEX `delivery_mailing` ON `delivery` (`mailing_id`,`state`);--> statement-breakpoint
CREATE TABLE `edition` (
	`id` text PRIMARY KEY NOT NULL,
	`project_id` text NOT NULL,
	`n` integer NOT NULL,
	`title` text NOT NULL,
	`summary` text NOT NULL,
	`minutes` integer,
	`pattern` text NOT NULL,
	`sizing` text NOT NULL,
	`write_up` text NOT NULL,
	`hero_upload_id` text,
	`correction_note` text DEFAULT '' NOT NULL,
	`published_by` text NOT NULL,
	`published_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`published_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `edition_project_n` ON `edition` (`project_id`,`n`);--> statement-breakpoint
CREATE TABLE `letter` (
	`id` text PRIMARY KEY NOT NULL,
	`to_name` text,
	`to_address` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`html` text NOT NULL,
	`headers` text DEFAULT '{}' NOT NULL,
	`state` text DEFAULT 'queued' NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`expires_at` integer NOT NULL,
	`reply` text,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL
);
--> statement-breakpoint
CREATE INDEX `letter_due` ON `letter` (`state`,`next_at`);--> statement-breakpoint
CREATE TABLE `mailing` (
	`id` text PRIMARY KEY NOT NULL,
	`project_id` text NOT NULL,
	`edition` integer NOT NULL,
	`author_id` text NOT NULL,
	`state` text DEFAULT 'draft' NOT NULL,
	`subject` text NOT NULL,
	`greeting` text NOT NULL,
	`excerpt` text NOT NULL,
	`with_hero` integer DEFAULT true NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`html` text,
	`text` text,
	`message_date` integer,
	`prepared_at` integer,
	`total` integer DEFAULT 0 NOT NULL,
	`pause_reason` text,
	`tested_at` integer,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`author_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `mailing_edition` ON `mailing` (`project_id`,`edition`);--> statement-breakpoint
CREATE TABLE `project` (
	`id` text PRIMARY KEY NOT NULL,
	`author_id` text NOT NULL,
	`slug` text NOT NULL,
	`title` text NOT NULL,
	`summary` text DEFAULT '' NOT NULL,
	`minutes` integer,
	`pattern` text NOT NULL,
	`sizing` text NOT NULL,
	`write_up` text NOT NULL,
	`hero_upload_id` text,
	`revision` integer DEFAULT 1 NOT NULL,
	`published_revision` integer,
	`deleted_at` integer,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`author_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `project_slug_unique` ON `project` (`slug`);--> statement-breakpoint
CREATE INDEX `project_author` ON `project` (`author_id`,`updated_at`);--> statement-breakpoint
CREATE TABLE `setting` (
	`key` text PRIMARY KEY NOT NULL,
	`value` text NOT NULL,
	`updated_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL
);
--> statement-breakpoint
CREATE TABLE `subscriber` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text,
	`email` text NOT NULL,
	`email_key` text NOT NULL,
	`state` text NOT NULL,
	`units` text DEFAULT 'in' NOT NULL,
	`confirm_hash` text,
	`confirm_expires` integer,
	`leave_token` text NOT NULL,
	`confirmed_at` integer,
	`left_at` integer,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `subscriber_email_key_unique` ON `subscriber` (`email_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `subscriber_leave_token_unique` ON `subscriber` (`leave_token`);--> statement-breakpoint
CREATE TABLE `suppression` (
	`email_key` text PRIMARY KEY NOT NULL,
	`reason` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL
);
--> statement-breakpoint
CREATE TABLE `upload` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`project_id` text,
	`width` integer NOT NULL,
	`height` integer NOT NULL,
	`bytes` integer NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE TABLE `user` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text,
	`email` text NOT NULL,
	`email_key` text NOT NULL,
	`email_verified` integer,
	`image` text,
	`password_hash` text,
	`role` text DEFAULT 'reader' NOT NULL,
	`disabled_at` integer,
	`session_version` integer DEFAULT 1 NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `user_email_key_unique` ON `user` (`email_key`);--> statement-breakpoint
CREATE TABLE `verification_token` (
	`identifier` text NOT NULL,
	`token` text NOT NULL,
	`expires` integer NOT NULL,
	PRIMARY KEY(`identifier`, `token`)
);
