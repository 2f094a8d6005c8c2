CREATE TABLE `stroke_figures` (
	`stroke_id` text NOT NULL,
	`measure` text NOT NULL,
	`value` real NOT NULL,
	`uncertainty` real NOT NULL,
	`frame` integer NOT NULL,
	PRIMARY KEY(`stroke_id`, `measure`),
	FOREIGN KEY (`stroke_id`) REFERENCES `strokes`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
ALTER TABLE `clips` ADD `figures_formulas` integer DEFAULT 0 NOT NULL;--> statement-breakpoint
CREATE INDEX `clips_formulas` ON `clips` (`figures_formulas`);--> statement-breakpoint
CREATE INDEX `clips_deleted` ON `clips` (`deleted_at`) WHERE "clips"."deleted_at" is not null;--> statement-breakpoint
CREATE INDEX `sessions_deleted` ON `sessions` (`deleted_at`) WHERE "sessions"."deleted_at" is not null;