CREATE TABLE `material` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`doc` text NOT NULL,
	`thickness_m` real,
	`roughness_m` real,
	`dk_frequency_hz` real,
	`version` integer DEFAULT 0 NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`updated_at` integer NOT NULL,
	`removed_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `material_team_name` ON `material` (`team_id`,`name`) WHERE removed_at is null;--> statement-breakpoint
CREATE INDEX `material_team` ON `material` (`team_id`,`kind`);