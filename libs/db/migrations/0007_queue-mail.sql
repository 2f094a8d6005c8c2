CREATE TABLE `mails` (
	`id` text PRIMARY KEY NOT NULL,
	`club_id` text NOT NULL,
	`person_id` text NOT NULL,
	`address` text NOT NULL,
	`kind` text NOT NULL,
	`data` text NOT NULL,
	`about` text,
	`message_id` text,
	`status` text NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_attempt_at` text NOT NULL,
	`taken_by` text,
	`last_error` text,
	`created_at` text NOT NULL,
	`finished_at` text,
	FOREIGN KEY (`club_id`) REFERENCES `clubs`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`person_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `mails_message_id` ON `mails` (`message_id`);--> statement-breakpoint
CREATE INDEX `mails_due` ON `mails` (`status`,`next_attempt_at`);--> statement-breakpoint
CREATE INDEX `mails_club` ON `mails` (`club_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `mails_person` ON `mails` (`person_id`);--> statement-breakpoint
CREATE INDEX `mails_about` ON `mails` (`about`);--> statement-breakpoint
CREATE TABLE `mails_switched_off` (
	`person_id` text NOT NULL,
	`kind` text NOT NULL,
	`since` text NOT NULL,
	PRIMARY KEY(`person_id`, `kind`),
	FOREIGN KEY (`person_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `password_resets` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`expires_at` text NOT NULL,
	`used_at` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `password_resets_token` ON `password_resets` (`token_hash`);--> statement-breakpoint
CREATE INDEX `password_resets_user` ON `password_resets` (`user_id`);--> statement-breakpoint
CREATE TABLE `password_wishes` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`created_at` text NOT NULL
);
