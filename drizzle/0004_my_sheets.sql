CREATE TABLE `sheet` (
	`user_id` text NOT NULL,
	`card` text NOT NULL,
	`count` integer NOT NULL,
	`place` integer NOT NULL,
	PRIMARY KEY(`user_id`, `card`),
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
