CREATE TABLE `athletes` (
	`id` text PRIMARY KEY NOT NULL,
	`club_id` text NOT NULL,
	`squad_id` text NOT NULL,
	`name` text NOT NULL,
	`deactivated_at` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`club_id`) REFERENCES `clubs`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`squad_id`) REFERENCES `squads`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `athletes_squad` ON `athletes` (`squad_id`);--> statement-breakpoint
CREATE INDEX `athletes_club` ON `athletes` (`club_id`);--> statement-breakpoint
CREATE TABLE `clubs` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`created_at` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `squad_coaches` (
	`squad_id` text NOT NULL,
	`user_id` text NOT NULL,
	PRIMARY KEY(`squad_id`, `user_id`),
	FOREIGN KEY (`squad_id`) REFERENCES `squads`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `squad_coaches_user` ON `squad_coaches` (`user_id`);--> statement-breakpoint
CREATE TABLE `squads` (
	`id` text PRIMARY KEY NOT NULL,
	`club_id` text NOT NULL,
	`name` text NOT NULL,
	`deactivated_at` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`club_id`) REFERENCES `clubs`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `squads_club_name` ON `squads` (`club_id`,lower("name"));--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`club_id` text NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`role` text NOT NULL,
	`password_hash` text,
	`athlete_id` text,
	`deactivated_at` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`club_id`) REFERENCES `clubs`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`athlete_id`) REFERENCES `athletes`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email` ON `users` (`email`);--> statement-breakpoint
CREATE INDEX `users_club` ON `users` (`club_id`);--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`expires_at` text NOT NULL,
	`used_at` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitations_token` ON `invitations` (`token_hash`);--> statement-breakpoint
CREATE INDEX `invitations_user` ON `invitations` (`user_id`);--> statement-breakpoint
CREATE TABLE `sign_ins` (
	`id_hash` text PRIMARY KEY NOT NULL,
	`user_id` text,
	`data` text NOT NULL,
	`expires_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `sign_ins_expires` ON `sign_ins` (`expires_at`);--> statement-breakpoint
CREATE INDEX `sign_ins_user` ON `sign_ins` (`user_id`);--> statement-breakpoint
CREATE TABLE `clip_frames` (
	`clip_id` text PRIMARY KEY NOT NULL,
	`timestamps_us` blob NOT NULL,
	`key_frames` blob NOT NULL,
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `clips` (
	`id` text PRIMARY KEY NOT NULL,
	`session_id` text NOT NULL,
	`name` text NOT NULL,
	`view` text NOT NULL,
	`travel` text NOT NULL,
	`stroke` text NOT NULL,
	`capture_rate_factor` real DEFAULT 1 NOT NULL,
	`plumb_top_x` real,
	`plumb_top_y` real,
	`plumb_bottom_x` real,
	`plumb_bottom_y` real,
	`status` text NOT NULL,
	`width` integer NOT NULL,
	`height` integer NOT NULL,
	`frame_count` integer NOT NULL,
	`duration_us` integer NOT NULL,
	`frame_rate` real,
	`codec` text NOT NULL,
	`container` text NOT NULL,
	`size_bytes` integer NOT NULL,
	`sha256` text NOT NULL,
	`cut_off` integer NOT NULL,
	`has_poster` integer NOT NULL,
	`created_at` text NOT NULL,
	`deleted_at` text,
	FOREIGN KEY (`session_id`) REFERENCES `sessions`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `clips_session` ON `clips` (`session_id`);--> statement-breakpoint
CREATE INDEX `clips_sha256` ON `clips` (`sha256`);--> statement-breakpoint
CREATE TABLE `marks` (
	`clip_id` text NOT NULL,
	`arm` text NOT NULL,
	`frame` integer NOT NULL,
	`shoulder_x` real NOT NULL,
	`shoulder_y` real NOT NULL,
	`elbow_x` real NOT NULL,
	`elbow_y` real NOT NULL,
	`wrist_x` real NOT NULL,
	`wrist_y` real NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`updated_at` text NOT NULL,
	`updated_by` text,
	PRIMARY KEY(`clip_id`, `arm`, `frame`),
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`athlete_id` text NOT NULL,
	`date` text NOT NULL,
	`place` text,
	`note` text,
	`created_at` text NOT NULL,
	`deleted_at` text,
	FOREIGN KEY (`athlete_id`) REFERENCES `athletes`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `sessions_athlete_date` ON `sessions` (`athlete_id`,`date`);--> statement-breakpoint
CREATE TABLE `strokes` (
	`id` text PRIMARY KEY NOT NULL,
	`clip_id` text NOT NULL,
	`arm` text NOT NULL,
	`entry_frame` integer NOT NULL,
	`catch_frame` integer NOT NULL,
	`exit_frame` integer NOT NULL,
	`next_entry_frame` integer,
	`breath` integer NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`updated_at` text NOT NULL,
	`updated_by` text,
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `strokes_clip_arm_entry` ON `strokes` (`clip_id`,`arm`,`entry_frame`);