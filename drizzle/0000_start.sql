CREATE TABLE `attempts` (
	`key` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`failures` integer NOT NULL,
	`last_at` integer NOT NULL,
	`blocked_until` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `commands` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`install_id` text NOT NULL,
	`kind` text NOT NULL,
	`fingerprint` text NOT NULL,
	`outcome` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `commands_created` ON `commands` (`created_at`);--> statement-breakpoint
CREATE TABLE `extinguisher_checks` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`extinguisher_id` text NOT NULL,
	`kind` text NOT NULL,
	`at` integer NOT NULL,
	`due` integer,
	`note` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`extinguisher_id`) REFERENCES `extinguishers`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `extinguisher_checks_seq` ON `extinguisher_checks` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `extinguisher_checks_of` ON `extinguisher_checks` (`extinguisher_id`);--> statement-breakpoint
CREATE TABLE `extinguishers` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`name` text NOT NULL,
	`agent` text NOT NULL,
	`class_b` integer NOT NULL,
	`charge` real NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `extinguishers_install` ON `extinguishers` (`install_id`);--> statement-breakpoint
CREATE TABLE `tool_checks` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`tool_id` text NOT NULL,
	`at` integer NOT NULL,
	`good` integer NOT NULL,
	`due` integer,
	`note` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`tool_id`) REFERENCES `tools`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `tool_checks_seq` ON `tool_checks` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `tool_checks_tool` ON `tool_checks` (`tool_id`);--> statement-breakpoint
CREATE TABLE `tools` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`name` text NOT NULL,
	`serial` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `tools_install` ON `tools` (`install_id`);--> statement-breakpoint
CREATE TABLE `events` (
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`type` text NOT NULL,
	`body` text NOT NULL,
	`prev` text NOT NULL,
	`hash` text NOT NULL,
	PRIMARY KEY(`install_id`, `seq`),
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `events_type` ON `events` (`install_id`,`type`);--> statement-breakpoint
CREATE TABLE `exceedance_answers` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`exceedance_id` text NOT NULL,
	`finding_id` text,
	`words` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`exceedance_id`) REFERENCES `exceedances`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `exceedance_answers_exceedance_id_unique` ON `exceedance_answers` (`exceedance_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `exceedance_answers_seq` ON `exceedance_answers` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `exceedances` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`run_id` text NOT NULL,
	`sentence` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `exceedances_seq` ON `exceedances` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `exceedances_run` ON `exceedances` (`run_id`);--> statement-breakpoint
CREATE TABLE `files` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`hash` text NOT NULL,
	`type` text NOT NULL,
	`size` integer NOT NULL,
	`name` text NOT NULL,
	`created_at` integer NOT NULL,
	`by` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `files_install` ON `files` (`install_id`,`hash`);--> statement-breakpoint
CREATE TABLE `finding_events` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`finding_id` text NOT NULL,
	`kind` text NOT NULL,
	`severity` text,
	`cap` real,
	`words` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`finding_id`) REFERENCES `findings`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `finding_events_seq` ON `finding_events` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `finding_events_of` ON `finding_events` (`finding_id`);--> statement-breakpoint
CREATE TABLE `findings` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`system` text NOT NULL,
	`words` text NOT NULL,
	`photo` text,
	`severity` text NOT NULL,
	`cap` real,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`photo`) REFERENCES `files`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `findings_seq` ON `findings` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `gates` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`key` text NOT NULL,
	`position` integer NOT NULL,
	`name` text NOT NULL,
	`short` text NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`needs` text NOT NULL,
	`after` text NOT NULL,
	`required_by` text NOT NULL,
	`each_run` integer NOT NULL,
	`look_back` text,
	`validity` text,
	`policy` text NOT NULL,
	`caution` text,
	`hidden` integer DEFAULT false NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `gates_install_key` ON `gates` (`install_id`,`key`);--> statement-breakpoint
CREATE TABLE `installs` (
	`id` text PRIMARY KEY NOT NULL,
	`registration` text NOT NULL,
	`name` text NOT NULL,
	`time_zone` text NOT NULL,
	`traits` text NOT NULL,
	`settings` text NOT NULL,
	`template_version` text NOT NULL,
	`positions` text NOT NULL,
	`left_out` text NOT NULL,
	`post_run` text NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `items` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`gate_id` text NOT NULL,
	`key` text NOT NULL,
	`position` integer NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`hidden` integer DEFAULT false NOT NULL,
	`words` text NOT NULL,
	`killer` integer NOT NULL,
	`second_eyes` integer NOT NULL,
	`guarded` integer NOT NULL,
	`on_card` integer NOT NULL,
	`systems` text NOT NULL,
	`parts` text NOT NULL,
	`follows` text NOT NULL,
	`step` text,
	`validity` text,
	`caution` text,
	`source` text,
	`offers_loose_end` text,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`gate_id`) REFERENCES `gates`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `items_install` ON `items` (`install_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `items_gate_key` ON `items` (`gate_id`,`key`);--> statement-breakpoint
CREATE TABLE `loose_end_events` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`loose_end_id` text NOT NULL,
	`kind` text NOT NULL,
	`rung` text,
	`reason` text,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`loose_end_id`) REFERENCES `loose_ends`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `loose_end_events_seq` ON `loose_end_events` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `loose_end_events_of` ON `loose_end_events` (`loose_end_id`);--> statement-breakpoint
CREATE TABLE `loose_ends` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`what` text NOT NULL,
	`count` integer NOT NULL,
	`system` text NOT NULL,
	`why` text NOT NULL,
	`asked_by` text,
	`due` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`asked_by`) REFERENCES `items`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `loose_ends_seq` ON `loose_ends` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `member_roles` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`user_id` text NOT NULL,
	`role` text NOT NULL,
	`from` integer NOT NULL,
	`to` integer,
	`granted_by` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`granted_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `member_roles_install` ON `member_roles` (`install_id`,`user_id`);--> statement-breakpoint
CREATE INDEX `member_roles_user` ON `member_roles` (`user_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `member_roles_open` ON `member_roles` (`install_id`,`user_id`,`role`) WHERE "to" is null;--> statement-breakpoint
CREATE TABLE `members` (
	`install_id` text NOT NULL,
	`user_id` text NOT NULL,
	`added_at` integer NOT NULL,
	`added_by` text NOT NULL,
	PRIMARY KEY(`install_id`, `user_id`),
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`added_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `members_user` ON `members` (`user_id`);--> statement-breakpoint
CREATE TABLE `opening_closings` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`opening_id` text NOT NULL,
	`closed` integer NOT NULL,
	`note` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`opening_id`) REFERENCES `openings`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `opening_closings_opening_id_unique` ON `opening_closings` (`opening_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `opening_closings_seq` ON `opening_closings` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `opening_mistakes` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`opening_id` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`opening_id`) REFERENCES `openings`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `opening_mistakes_opening_id_unique` ON `opening_mistakes` (`opening_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `opening_mistakes_seq` ON `opening_mistakes` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `openings` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`systems` text NOT NULL,
	`reason` text NOT NULL,
	`opened` integer NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `openings_seq` ON `openings` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text,
	`kind` text NOT NULL,
	`to_user_id` text,
	`to_address` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`html` text,
	`attachments` text DEFAULT '[]' NOT NULL,
	`message_id` text NOT NULL,
	`in_reply_to` text,
	`references` text DEFAULT '[]' NOT NULL,
	`dedupe_key` text NOT NULL,
	`created_at` integer NOT NULL,
	`next_try_at` integer NOT NULL,
	`tries` integer DEFAULT 0 NOT NULL,
	`lease_until` integer DEFAULT 0 NOT NULL,
	`lease_by` text,
	`sent_at` integer,
	`failed_at` integer,
	`last_error` text
);
--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_message_id_unique` ON `outbox` (`message_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_dedupe_key_unique` ON `outbox` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`sent_at`,`failed_at`,`next_try_at`);--> statement-breakpoint
CREATE INDEX `outbox_install` ON `outbox` (`install_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `acceptances` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`proof_id` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`proof_id`) REFERENCES `proofs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `acceptances_seq` ON `acceptances` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `confirmations` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`proof_id` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`proof_id`) REFERENCES `proofs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `confirmations_seq` ON `confirmations` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `keeps` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`proof_id` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`proof_id`) REFERENCES `proofs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `keeps_seq` ON `keeps` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `proof_withdrawals` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`proof_id` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`proof_id`) REFERENCES `proofs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `proof_withdrawals_seq` ON `proof_withdrawals` (`install_id`,`seq`);--> statement-breakpoint
CREATE UNIQUE INDEX `proof_withdrawals_proof` ON `proof_withdrawals` (`proof_id`);--> statement-breakpoint
CREATE TABLE `proofs` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`item_id` text NOT NULL,
	`revision` integer NOT NULL,
	`did` text NOT NULL,
	`counts` integer NOT NULL,
	`late` integer NOT NULL,
	`state` text NOT NULL,
	`evidence` text NOT NULL,
	`tools` text NOT NULL,
	`note` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`item_id`) REFERENCES `items`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`did`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `proofs_seq` ON `proofs` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `proofs_item` ON `proofs` (`item_id`);--> statement-breakpoint
CREATE TABLE `rung_events` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`rung` text NOT NULL,
	`kind` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `rung_events_seq` ON `rung_events` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `rungs` (
	`install_id` text NOT NULL,
	`key` text NOT NULL,
	`position` integer NOT NULL,
	`name` text NOT NULL,
	`rpm` real,
	`share` real NOT NULL,
	`card` text NOT NULL,
	`crew` text NOT NULL,
	PRIMARY KEY(`install_id`, `key`),
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `acks` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`run_id` text NOT NULL,
	`version` integer NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `acks_seq` ON `acks` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `answers` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`run_id` text NOT NULL,
	`version` integer NOT NULL,
	`answer` text NOT NULL,
	`reason` text NOT NULL,
	`queue_empty` integer NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `answers_seq` ON `answers` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `plan_versions` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`run_id` text NOT NULL,
	`version` integer NOT NULL,
	`rpm` real NOT NULL,
	`card` text NOT NULL,
	`positions` text NOT NULL,
	`wind_limit` real NOT NULL,
	`gust_limit` real NOT NULL,
	`required_gates` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_versions_seq` ON `plan_versions` (`install_id`,`seq`);--> statement-breakpoint
CREATE UNIQUE INDEX `plan_versions_run` ON `plan_versions` (`run_id`,`version`);--> statement-breakpoint
CREATE TABLE `run_acts` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`run_id` text NOT NULL,
	`act` text NOT NULL,
	`detail` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `run_acts_seq` ON `run_acts` (`install_id`,`seq`);--> statement-breakpoint
CREATE INDEX `run_acts_run` ON `run_acts` (`run_id`);--> statement-breakpoint
CREATE TABLE `runs` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`rung` text NOT NULL,
	`label` text NOT NULL,
	`place` text NOT NULL,
	`planned_start` integer,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `runs_install_label` ON `runs` (`install_id`,`label`);--> statement-breakpoint
CREATE TABLE `winds` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`run_id` text NOT NULL,
	`speed` real NOT NULL,
	`gust` real NOT NULL,
	`tail` integer NOT NULL,
	`day_ends` integer NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `winds_seq` ON `winds` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`created_at` integer NOT NULL,
	`last_seen_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`user_agent` text DEFAULT '' NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE TABLE `release_signature_withdrawals` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`signature_id` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`signature_id`) REFERENCES `release_signatures`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `release_signature_withdrawals_seq` ON `release_signature_withdrawals` (`install_id`,`seq`);--> statement-breakpoint
CREATE UNIQUE INDEX `release_signature_withdrawals_one` ON `release_signature_withdrawals` (`signature_id`);--> statement-breakpoint
CREATE TABLE `release_signatures` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`covers` text NOT NULL,
	`meaning` text NOT NULL,
	`rules_version` text NOT NULL,
	`shown_text` text NOT NULL,
	`shown_hash` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `release_signatures_seq` ON `release_signatures` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `signature_withdrawals` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`signature_id` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`signature_id`) REFERENCES `signatures`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `signature_withdrawals_seq` ON `signature_withdrawals` (`install_id`,`seq`);--> statement-breakpoint
CREATE UNIQUE INDEX `signature_withdrawals_one` ON `signature_withdrawals` (`signature_id`);--> statement-breakpoint
CREATE TABLE `signatures` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`gate_id` text NOT NULL,
	`gate_revision` integer NOT NULL,
	`covers` text NOT NULL,
	`meaning` text NOT NULL,
	`rules_version` text NOT NULL,
	`shown_text` text NOT NULL,
	`shown_hash` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`gate_id`) REFERENCES `gates`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `signatures_seq` ON `signatures` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`password_hash` text NOT NULL,
	`pin_hash` text,
	`units` text DEFAULT 'si' NOT NULL,
	`theme` text DEFAULT 'auto' NOT NULL,
	`is_admin` integer DEFAULT false NOT NULL,
	`created_at` integer NOT NULL,
	`disabled_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email_unique` ON `users` (`email`);--> statement-breakpoint
CREATE TABLE `values` (
	`install_id` text NOT NULL,
	`key` text NOT NULL,
	`position` integer NOT NULL,
	`def` text NOT NULL,
	`value` real,
	`source` text,
	PRIMARY KEY(`install_id`, `key`),
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict
);
