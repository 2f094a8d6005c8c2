CREATE TABLE `clip_scales` (
	`clip_id` text PRIMARY KEY NOT NULL,
	`scale` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`updated_at` text NOT NULL,
	`updated_by` text,
	FOREIGN KEY (`clip_id`) REFERENCES `clips`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `stroke_cautions` (
	`stroke_id` text NOT NULL,
	`code` text NOT NULL,
	`measure` text NOT NULL,
	`size_deg` real NOT NULL,
	`assumed` integer NOT NULL,
	PRIMARY KEY(`stroke_id`, `code`, `measure`),
	FOREIGN KEY (`stroke_id`) REFERENCES `strokes`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
ALTER TABLE `clips` ADD `field_of_view_deg` real;--> statement-breakpoint
ALTER TABLE `clips` ADD `field_of_view_medium` text;