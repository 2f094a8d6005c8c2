CREATE TABLE `finding_messages` (
	`id` text PRIMARY KEY NOT NULL,
	`finding_id` text NOT NULL,
	`question_id` text,
	`words` text NOT NULL,
	`author_id` text,
	`created_at` text NOT NULL,
	`read_at` text,
	FOREIGN KEY (`finding_id`) REFERENCES `findings`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE INDEX `finding_messages_finding` ON `finding_messages` (`finding_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `finding_readings` (
	`id` text PRIMARY KEY NOT NULL,
	`finding_id` text NOT NULL,
	`position` integer NOT NULL,
	`source` text NOT NULL,
	`frozen` text,
	FOREIGN KEY (`finding_id`) REFERENCES `findings`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `finding_readings_finding` ON `finding_readings` (`finding_id`,`position`);--> statement-breakpoint
CREATE TABLE `findings` (
	`id` text PRIMARY KEY NOT NULL,
	`review_id` text NOT NULL,
	`position` integer NOT NULL,
	`kind` text NOT NULL,
	`words` text NOT NULL,
	`arm` text NOT NULL,
	`phase` text NOT NULL,
	`observation_id` text,
	`observation_name` text,
	`main_focus` integer DEFAULT false NOT NULL,
	`drill_id` text,
	`version` integer DEFAULT 1 NOT NULL,
	`updated_at` text NOT NULL,
	`updated_by` text,
	FOREIGN KEY (`review_id`) REFERENCES `reviews`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`observation_id`) REFERENCES `observations`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`updated_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE INDEX `findings_review` ON `findings` (`review_id`,`position`);--> statement-breakpoint
CREATE UNIQUE INDEX `findings_main_focus` ON `findings` (`review_id`) WHERE "findings"."main_focus" = 1;--> statement-breakpoint
CREATE TABLE `observations` (
	`id` text PRIMARY KEY NOT NULL,
	`club_id` text NOT NULL,
	`name` text NOT NULL,
	`retired` integer DEFAULT false NOT NULL,
	`created_at` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`club_id`) REFERENCES `clubs`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `observations_club_name` ON `observations` (`club_id`,lower("name"));--> statement-breakpoint
CREATE TABLE `reviews` (
	`id` text PRIMARY KEY NOT NULL,
	`athlete_id` text NOT NULL,
	`session_id` text,
	`request_id` text,
	`author_id` text,
	`state` text DEFAULT 'draft' NOT NULL,
	`created_at` text NOT NULL,
	`updated_at` text NOT NULL,
	`sent_at` text,
	`read_at` text,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`athlete_id`) REFERENCES `athletes`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`session_id`) REFERENCES `sessions`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE INDEX `reviews_athlete` ON `reviews` (`athlete_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `reviews_session` ON `reviews` (`session_id`);--> statement-breakpoint
CREATE TABLE `snippets` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`words` text NOT NULL,
	`created_at` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `snippets_user` ON `snippets` (`user_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `stills` (
	`id` text PRIMARY KEY NOT NULL,
	`finding_id` text NOT NULL,
	`position` integer NOT NULL,
	`file_id` text,
	`layout` text NOT NULL,
	`parts` text NOT NULL,
	`overlays` integer NOT NULL,
	`drawings` text NOT NULL,
	`words` text NOT NULL,
	`width` integer NOT NULL,
	`height` integer NOT NULL,
	`removed_at` text,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`finding_id`) REFERENCES `findings`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `stills_finding` ON `stills` (`finding_id`,`position`);