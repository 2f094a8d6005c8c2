CREATE TABLE `targets` (
	`id` text PRIMARY KEY NOT NULL,
	`athlete_id` text NOT NULL,
	`measure` text NOT NULL,
	`arm` text NOT NULL,
	`low` real,
	`high` real,
	`words` text NOT NULL,
	`set_by` text,
	`set_at` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`deleted_at` text,
	FOREIGN KEY (`athlete_id`) REFERENCES `athletes`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`set_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE UNIQUE INDEX `targets_one_each` ON `targets` (`athlete_id`,`measure`,`arm`) WHERE "targets"."deleted_at" is null;--> statement-breakpoint
CREATE INDEX `targets_deleted` ON `targets` (`deleted_at`) WHERE "targets"."deleted_at" is not null;