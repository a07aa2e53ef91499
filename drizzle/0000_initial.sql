CREATE TABLE `account` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`provider_id` text NOT NULL,
	`user_id` text NOT NULL,
	`access_token` text,
	`refresh_token` text,
	`id_token` text,
	`access_token_expires_at` integer,
	`refresh_token_expires_at` integer,
	`scope` text,
	`password` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `account_user` ON `account` (`user_id`);--> statement-breakpoint
CREATE TABLE `invitation` (
	`id` text PRIMARY KEY NOT NULL,
	`organization_id` text NOT NULL,
	`email` text NOT NULL,
	`role` text,
	`status` text DEFAULT 'pending' NOT NULL,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	`inviter_id` text NOT NULL,
	FOREIGN KEY (`organization_id`) REFERENCES `organization`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`inviter_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `invitation_email` ON `invitation` (`email`);--> statement-breakpoint
CREATE INDEX `invitation_organization` ON `invitation` (`organization_id`);--> statement-breakpoint
CREATE TABLE `member` (
	`id` text PRIMARY KEY NOT NULL,
	`organization_id` text NOT NULL,
	`user_id` text NOT NULL,
	`role` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`organization_id`) REFERENCES `organization`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `member_once` ON `member` (`organization_id`,`user_id`);--> statement-breakpoint
CREATE INDEX `member_user` ON `member` (`user_id`);--> statement-breakpoint
CREATE TABLE `organization` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`slug` text NOT NULL,
	`logo` text,
	`created_at` integer NOT NULL,
	`metadata` text
);
--> statement-breakpoint
CREATE UNIQUE INDEX `organization_slug_unique` ON `organization` (`slug`);--> statement-breakpoint
CREATE TABLE `rate_limit` (
	`id` text PRIMARY KEY NOT NULL,
	`key` text NOT NULL,
	`count` integer NOT NULL,
	`last_request` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `rate_limit_key_unique` ON `rate_limit` (`key`);--> statement-breakpoint
CREATE TABLE `session` (
	`id` text PRIMARY KEY NOT NULL,
	`expires_at` integer NOT NULL,
	`token` text NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	`ip_address` text,
	`user_agent` text,
	`user_id` text NOT NULL,
	`active_organization_id` text,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `session_token_unique` ON `session` (`token`);--> statement-breakpoint
CREATE INDEX `session_user` ON `session` (`user_id`);--> statement-breakpoint
CREATE TABLE `user` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`email_verified` integer DEFAULT false NOT NULL,
	`image` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `user_email_unique` ON `user` (`email`);--> statement-breakpoint
CREATE TABLE `verification` (
	`id` text PRIMARY KEY NOT NULL,
	`identifier` text NOT NULL,
	`value` text NOT NULL,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `verification_identifier` ON `verification` (`identifier`);--> statement-breakpoint
CREATE TABLE `binding` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`position` integer NOT NULL,
	`reference_pattern` text NOT NULL,
	`part_number_pattern` text NOT NULL,
	`pin_pattern` text NOT NULL,
	`net_pattern` text NOT NULL,
	`role` text NOT NULL,
	`model_lineage_id` text,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `binding_revision` ON `binding` (`revision_id`,`position`);--> statement-breakpoint
CREATE TABLE `edit` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`actor_id` text NOT NULL,
	`at` integer NOT NULL,
	`entity` text NOT NULL,
	`entity_id` text,
	`summary` text NOT NULL,
	`before` text,
	`after` text,
	`undone_at` integer,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `edit_revision_at` ON `edit` (`revision_id`,`at`);--> statement-breakpoint
CREATE INDEX `edit_team` ON `edit` (`team_id`);--> statement-breakpoint
CREATE TABLE `model` (
	`id` text PRIMARY KEY NOT NULL,
	`lineage_id` text NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`name` text NOT NULL,
	`doc` text NOT NULL,
	`version` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `model_lineage` ON `model` (`revision_id`,`lineage_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `model_name` ON `model` (`revision_id`,`name`);--> statement-breakpoint
CREATE TABLE `net_class` (
	`id` text PRIMARY KEY NOT NULL,
	`lineage_id` text NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`name` text NOT NULL,
	`doc` text NOT NULL,
	`target_impedance_ohm` real,
	`version` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `net_class_lineage` ON `net_class` (`revision_id`,`lineage_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `net_class_name` ON `net_class` (`revision_id`,`name`);--> statement-breakpoint
CREATE TABLE `project` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`name` text NOT NULL,
	`description` text DEFAULT '' NOT NULL,
	`unit` text DEFAULT 'mm' NOT NULL,
	`version` integer DEFAULT 0 NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`updated_at` integer NOT NULL,
	`archived_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `project_team_name` ON `project` (`team_id`,`name`);--> statement-breakpoint
CREATE TABLE `revision` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`letter` text NOT NULL,
	`state` text NOT NULL,
	`parent_revision_id` text,
	`edit_count` integer DEFAULT 0 NOT NULL,
	`snapshot_hash` text,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`released_at` integer,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `revision_project_letter` ON `revision` (`project_id`,`letter`);--> statement-breakpoint
CREATE INDEX `revision_team` ON `revision` (`team_id`);--> statement-breakpoint
CREATE TABLE `rule_set` (
	`revision_id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`doc` text NOT NULL,
	`bindings_version` integer DEFAULT 0 NOT NULL,
	`version` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `stackup` (
	`revision_id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`name` text NOT NULL,
	`version` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `stackup_layer` (
	`id` text PRIMARY KEY NOT NULL,
	`lineage_id` text NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`position` integer NOT NULL,
	`kind` text NOT NULL,
	`name` text NOT NULL,
	`doc` text NOT NULL,
	`thickness_m` real,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `stackup_layer_position` ON `stackup_layer` (`revision_id`,`position`);--> statement-breakpoint
CREATE INDEX `stackup_layer_team` ON `stackup_layer` (`team_id`);--> statement-breakpoint
CREATE TABLE `import_batch` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`kind` text NOT NULL,
	`file_name` text NOT NULL,
	`state` text NOT NULL,
	`mapping` text NOT NULL,
	`source` blob,
	`report` text,
	`total` integer DEFAULT 0 NOT NULL,
	`done` integer DEFAULT 0 NOT NULL,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`finished_at` integer,
	`error` text,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `import_batch_revision` ON `import_batch` (`revision_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `neighbour` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`net` text NOT NULL,
	`neighbour` text NOT NULL,
	`layer` text NOT NULL,
	`gap_value` text NOT NULL,
	`gap_unit` text NOT NULL,
	`gap_m` real NOT NULL,
	`parallel_value` text NOT NULL,
	`parallel_unit` text NOT NULL,
	`parallel_m` real NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `neighbour_revision_net` ON `neighbour` (`revision_id`,`net`);--> statement-breakpoint
CREATE TABLE `net` (
	`id` text PRIMARY KEY NOT NULL,
	`lineage_id` text NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`name` text NOT NULL,
	`class_lineage_id` text,
	`scope` text NOT NULL,
	`scope_kind` text DEFAULT 'signal' NOT NULL,
	`doc` text NOT NULL,
	`pin_count` integer NOT NULL,
	`section_count` integer NOT NULL,
	`via_count` integer NOT NULL,
	`length_m` real NOT NULL,
	`layers` text DEFAULT '' NOT NULL,
	`version` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `net_lineage` ON `net` (`revision_id`,`lineage_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `net_name` ON `net` (`revision_id`,`name`);--> statement-breakpoint
CREATE INDEX `net_team` ON `net` (`team_id`);--> statement-breakpoint
CREATE TABLE `part` (
	`id` text PRIMARY KEY NOT NULL,
	`lineage_id` text NOT NULL,
	`team_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`reference` text NOT NULL,
	`part_number` text DEFAULT '' NOT NULL,
	`kind` text NOT NULL,
	`doc` text NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `part_reference` ON `part` (`revision_id`,`reference`);--> statement-breakpoint
CREATE INDEX `part_team` ON `part` (`team_id`);--> statement-breakpoint
CREATE TABLE `chunk` (
	`team_id` text NOT NULL,
	`sha256` text NOT NULL,
	`bytes` integer NOT NULL,
	`content` blob NOT NULL,
	PRIMARY KEY(`team_id`, `sha256`)
);
--> statement-breakpoint
CREATE TABLE `finding` (
	`id` text PRIMARY KEY NOT NULL,
	`run_id` text NOT NULL,
	`team_id` text NOT NULL,
	`path_id` text NOT NULL,
	`mechanism` text NOT NULL,
	`rule` text NOT NULL,
	`verdict` text NOT NULL,
	`value` real,
	`limit_value` real,
	`limit_origin` text,
	`unit` text NOT NULL,
	`margin` real,
	`severity` text NOT NULL,
	`counts` integer NOT NULL,
	`corner` text,
	`pin` text,
	`driver` text,
	`edge` text,
	`time_s` real,
	`fails_at` integer NOT NULL,
	`of_corners` integer NOT NULL,
	`fails_at_nominal` integer NOT NULL,
	`missing` text,
	`cause` text,
	`rests_on_assumed` integer NOT NULL,
	FOREIGN KEY (`run_id`) REFERENCES `run`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `finding_run_path` ON `finding` (`run_id`,`path_id`);--> statement-breakpoint
CREATE INDEX `finding_run_rule` ON `finding` (`run_id`,`rule`);--> statement-breakpoint
CREATE TABLE `path_result` (
	`run_id` text NOT NULL,
	`team_id` text NOT NULL,
	`path_id` text NOT NULL,
	`name` text NOT NULL,
	`class_name` text,
	`class_lineage_id` text,
	`driver` text,
	`layers` text DEFAULT '' NOT NULL,
	`verdict` text NOT NULL,
	`worst_rule` text,
	`worst_margin` real,
	`input_hash` text NOT NULL,
	`detail` blob NOT NULL,
	PRIMARY KEY(`run_id`, `path_id`),
	FOREIGN KEY (`run_id`) REFERENCES `run`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `path_result_verdict` ON `path_result` (`run_id`,`verdict`);--> statement-breakpoint
CREATE TABLE `problem` (
	`id` text PRIMARY KEY NOT NULL,
	`run_id` text NOT NULL,
	`team_id` text NOT NULL,
	`path_id` text NOT NULL,
	`path_name` text NOT NULL,
	`class_name` text,
	`mechanism` text NOT NULL,
	`title` text NOT NULL,
	`verdict` text NOT NULL,
	`severity` text NOT NULL,
	`worst_rule` text NOT NULL,
	`worst_margin` real,
	`worst_share` real,
	`worst_corner` text,
	`fails_at` integer NOT NULL,
	`of_corners` integer NOT NULL,
	`fails_at_nominal` integer NOT NULL,
	`missing` text,
	`cause` text,
	`rests_on_assumed` integer NOT NULL,
	FOREIGN KEY (`run_id`) REFERENCES `run`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `problem_path_mechanism` ON `problem` (`run_id`,`path_id`,`mechanism`);--> statement-breakpoint
CREATE INDEX `problem_team` ON `problem` (`team_id`);--> statement-breakpoint
CREATE TABLE `run` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`number` integer NOT NULL,
	`state` text NOT NULL,
	`input_hash` text NOT NULL,
	`input_chunks` text NOT NULL,
	`engine_version` text NOT NULL,
	`runtime_version` text NOT NULL,
	`corners` text NOT NULL,
	`total` integer NOT NULL,
	`done` integer DEFAULT 0 NOT NULL,
	`counts` text,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`started_at` integer,
	`finished_at` integer,
	`lease_until` integer,
	`error` text,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `run_project_number` ON `run` (`project_id`,`number`);--> statement-breakpoint
CREATE INDEX `run_team` ON `run` (`team_id`);--> statement-breakpoint
CREATE INDEX `run_state` ON `run` (`state`);--> statement-breakpoint
CREATE TABLE `flag` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_lineage_id` text NOT NULL,
	`mechanism` text,
	`title` text NOT NULL,
	`state` text NOT NULL,
	`assignee_user_id` text,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`resolved_at` integer,
	`resolved_by` text,
	`version` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `flag_project` ON `flag` (`project_id`,`state`);--> statement-breakpoint
CREATE INDEX `flag_subject` ON `flag` (`project_id`,`subject_lineage_id`);--> statement-breakpoint
CREATE TABLE `flag_entry` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`flag_id` text NOT NULL,
	`author_id` text NOT NULL,
	`at` integer NOT NULL,
	`comment` text NOT NULL,
	FOREIGN KEY (`flag_id`) REFERENCES `flag`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `flag_entry_flag` ON `flag_entry` (`flag_id`,`at`);--> statement-breakpoint
CREATE TABLE `no_data_acceptance` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`missing` text NOT NULL,
	`reason` text NOT NULL,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`revoked_at` integer,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `no_data_acceptance_once` ON `no_data_acceptance` (`revision_id`,`missing`,`revoked_at`);--> statement-breakpoint
CREATE TABLE `sign_off` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`run_id` text NOT NULL,
	`input_hash` text NOT NULL,
	`signed_by` text NOT NULL,
	`signed_at` integer NOT NULL,
	`remark` text DEFAULT '' NOT NULL,
	`withdrawn_at` integer,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`run_id`) REFERENCES `run`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `sign_off_revision` ON `sign_off` (`revision_id`);--> statement-breakpoint
CREATE TABLE `waiver` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`path_lineage_id` text NOT NULL,
	`path_name` text NOT NULL,
	`mechanism` text NOT NULL,
	`run_id` text NOT NULL,
	`waived` text NOT NULL,
	`worst_margin` real,
	`reason` text NOT NULL,
	`expires_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`revoked_at` integer,
	`revoked_by` text,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`run_id`) REFERENCES `run`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `waiver_project` ON `waiver` (`project_id`,`path_lineage_id`);--> statement-breakpoint
CREATE TABLE `release` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`project_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`run_id` text NOT NULL,
	`letter` text NOT NULL,
	`title` text NOT NULL,
	`snapshot_chunks` text NOT NULL,
	`snapshot_hash` text NOT NULL,
	`note` text NOT NULL,
	`note_hash` text NOT NULL,
	`sign_off_id` text NOT NULL,
	`released_by` text NOT NULL,
	`released_at` integer NOT NULL,
	FOREIGN KEY (`project_id`) REFERENCES `project`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`revision_id`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`run_id`) REFERENCES `run`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `release_revision` ON `release` (`revision_id`);--> statement-breakpoint
CREATE INDEX `release_team` ON `release` (`team_id`);--> statement-breakpoint
CREATE TABLE `release_recipient` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`release_id` text NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`company` text DEFAULT '' NOT NULL,
	`token_hash` text,
	`token_expires_at` integer,
	`revoked_at` integer,
	`viewed_at` integer,
	`downloaded_at` integer,
	`acknowledged_at` integer,
	`acknowledged_by` text,
	`acknowledgement` text DEFAULT '' NOT NULL,
	`sends` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`release_id`) REFERENCES `release`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `release_recipient_email` ON `release_recipient` (`release_id`,`email`);--> statement-breakpoint
CREATE UNIQUE INDEX `release_recipient_token` ON `release_recipient` (`token_hash`);--> statement-breakpoint
CREATE TABLE `account_attempt` (
	`account` text NOT NULL,
	`action` text NOT NULL,
	`window_start` integer NOT NULL,
	`count` integer NOT NULL,
	PRIMARY KEY(`account`, `action`, `window_start`)
);
--> statement-breakpoint
CREATE TABLE `audit_entry` (
	`id` text PRIMARY KEY NOT NULL,
	`team_id` text NOT NULL,
	`seq` integer NOT NULL,
	`at` integer NOT NULL,
	`actor_id` text NOT NULL,
	`actor_name` text NOT NULL,
	`action` text NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text,
	`project_id` text,
	`detail` text NOT NULL,
	`previous_hash` text NOT NULL,
	`hash` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `audit_entry_seq` ON `audit_entry` (`team_id`,`seq`);--> statement-breakpoint
CREATE INDEX `audit_entry_at` ON `audit_entry` (`team_id`,`at`);--> statement-breakpoint
CREATE TABLE `outbox_message` (
	`id` text PRIMARY KEY NOT NULL,
	`at` integer NOT NULL,
	`recipient` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`html` text NOT NULL
);
--> statement-breakpoint
CREATE INDEX `outbox_message_at` ON `outbox_message` (`at`);--> statement-breakpoint
CREATE TABLE `user_preference` (
	`user_id` text PRIMARY KEY NOT NULL,
	`length_unit` text DEFAULT 'mm' NOT NULL,
	`theme` text DEFAULT 'system' NOT NULL
);
