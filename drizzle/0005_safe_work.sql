CREATE TABLE `co_author` (
	`id` text PRIMARY KEY NOT NULL,
	`project_id` text NOT NULL,
	`email_key` text NOT NULL,
	`user_id` text,
	`invited_by` text,
	`state` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`accepted_at` integer,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`invited_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE UNIQUE INDEX `co_author_address` ON `co_author` (`project_id`,`email_key`);--> statement-breakpoint
CREATE INDEX `co_author_person` ON `co_author` (`user_id`);--> statement-breakpoint
CREATE INDEX `co_author_invited` ON `co_author` (`email_key`);--> statement-breakpoint
CREATE TABLE `draft_link` (
	`id` text PRIMARY KEY NOT NULL,
	`project_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`label` text DEFAULT '' NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`revoked_at` integer,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `draft_link_token_hash_unique` ON `draft_link` (`token_hash`);--> statement-breakpoint
CREATE INDEX `draft_link_project` ON `draft_link` (`project_id`);--> statement-breakpoint
CREATE TABLE `own_pattern` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`name` text NOT NULL,
	`pattern` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `own_pattern_owner` ON `own_pattern` (`owner_id`,`name`);--> statement-breakpoint
CREATE TABLE `revision` (
	`project_id` text NOT NULL,
	`n` integer NOT NULL,
	`state` text NOT NULL,
	`kind` text DEFAULT 'saved' NOT NULL,
	`saved_by` text,
	`saved_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	PRIMARY KEY(`project_id`, `n`),
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`saved_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE TABLE `schedule` (
	`project_id` text PRIMARY KEY NOT NULL,
	`revision` integer NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`publish_at` integer NOT NULL,
	`set_by` text NOT NULL,
	`problem` text,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`set_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `slug_redirect` (
	`slug` text PRIMARY KEY NOT NULL,
	`project_id` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `slug_redirect_project` ON `slug_redirect` (`project_id`);--> statement-breakpoint
CREATE TABLE `source_text` (
	`id` text PRIMARY KEY NOT NULL,
	`project_id` text NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`text` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch('subsec') * 1000) NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `source_text_project` ON `source_text` (`project_id`);--> statement-breakpoint
ALTER TABLE `project` ADD `withdrawn_at` integer;--> statement-breakpoint
ALTER TABLE `project` ADD `withdrawn_reason` text DEFAULT '' NOT NULL;--> statement-breakpoint
-- What stands in each project now is its first kept revision.
INSERT INTO `revision` (`project_id`, `n`, `state`, `saved_by`, `saved_at`)
SELECT `id`, `revision`,
	json_object('title', `title`, 'summary', `summary`, 'minutes', `minutes`, 'hero', `hero_upload_id`,
		'pattern', json(`pattern`), 'sizing', json(`sizing`), 'writeUp', json(`write_up`)),
	`author_id`, `updated_at`
FROM `project`;
