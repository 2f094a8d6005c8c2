CREATE TABLE `clip_distances` (
	`clip_id` text PRIMARY KEY NOT NULL,
	`metres` real NOT NULL,
	`uncertainty_m` real NOT NULL,
	`from_frame` integer NOT NULL,
	`to_frame` integer NOT NULL,
	`updated_at` text NOT NULL,
	`updated_by` text,
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `coordination_figures` (
	`stroke_id` text PRIMARY KEY NOT NULL,
	`clip_id` text NOT NULL,
	`value` real NOT NULL,
	`uncertainty` real NOT NULL,
	`breath` integer NOT NULL,
	`frame` integer NOT NULL,
	FOREIGN KEY (`stroke_id`) REFERENCES `strokes`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `coordination_figures_clip` ON `coordination_figures` (`clip_id`);--> statement-breakpoint
ALTER TABLE `strokes` ADD `entry_source` text DEFAULT 'hand-seen' NOT NULL;--> statement-breakpoint
ALTER TABLE `strokes` ADD `catch_source` text DEFAULT 'hand-seen' NOT NULL;--> statement-breakpoint
ALTER TABLE `strokes` ADD `exit_source` text DEFAULT 'hand-seen' NOT NULL;--> statement-breakpoint
ALTER TABLE `strokes` ADD `next_entry_source` text DEFAULT 'hand-seen' NOT NULL;