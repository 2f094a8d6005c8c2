ALTER TABLE `clips` ADD `marker_id` text REFERENCES users(id) ON DELETE set null;--> statement-breakpoint
ALTER TABLE `clips` ADD `joint_shoulder_px` real;--> statement-breakpoint
ALTER TABLE `clips` ADD `joint_elbow_px` real;--> statement-breakpoint
ALTER TABLE `clips` ADD `joint_wrist_px` real;--> statement-breakpoint
UPDATE `clips` SET `marker_id` = (
	SELECT `updated_by` FROM `marks`
	WHERE `marks`.`clip_id` = `clips`.`id` AND `updated_by` IN (SELECT `id` FROM `users`)
	GROUP BY `updated_by` ORDER BY count(*) DESC, max(`updated_at`) DESC LIMIT 1
);
