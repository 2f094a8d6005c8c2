CREATE TABLE `marking_figures` (
	`user_id` text PRIMARY KEY NOT NULL,
	`shoulder_at1080` real NOT NULL,
	`elbow_at1080` real NOT NULL,
	`wrist_at1080` real NOT NULL,
	`frames` integer NOT NULL,
	`measured_at` text NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `marking_rounds` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`clip_id` text NOT NULL,
	`created_at` text NOT NULL,
	`finished_at` text,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `marking_rounds_user` ON `marking_rounds` (`user_id`);--> statement-breakpoint
CREATE INDEX `marking_rounds_clip` ON `marking_rounds` (`clip_id`);--> statement-breakpoint
CREATE TABLE `round_marks` (
	`round_id` text NOT NULL,
	`position` integer NOT NULL,
	`arm` text NOT NULL,
	`frame` integer NOT NULL,
	`first_by` text,
	`first_shoulder_x` real NOT NULL,
	`first_shoulder_y` real NOT NULL,
	`first_elbow_x` real NOT NULL,
	`first_elbow_y` real NOT NULL,
	`first_wrist_x` real NOT NULL,
	`first_wrist_y` real NOT NULL,
	`shoulder_x` real,
	`shoulder_y` real,
	`elbow_x` real,
	`elbow_y` real,
	`wrist_x` real,
	`wrist_y` real,
	PRIMARY KEY(`round_id`, `position`),
	FOREIGN KEY (`round_id`) REFERENCES `marking_rounds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`first_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
ALTER TABLE `clips` ADD `marker_id` text REFERENCES users(id) ON DELETE set null;--> statement-breakpoint
ALTER TABLE `clips` ADD `joint_shoulder_px` real;--> statement-breakpoint
ALTER TABLE `clips` ADD `joint_elbow_px` real;--> statement-breakpoint
ALTER TABLE `clips` ADD `joint_wrist_px` real;--> statement-breakpoint
UPDATE `clips` SET `marker_id` = (
	SELECT `updated_by` FROM `marks`
	WHERE `marks`.`clip_id` = `clips`.`id` AND `updated_by` IN (SELECT `id` FROM `users`)
	GROUP BY `updated_by` ORDER BY count(*) DESC, max(`updated_at`) DESC LIMIT 1
);
