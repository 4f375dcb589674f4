CREATE TABLE `board_templates` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`name` text NOT NULL,
	`body` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `board_templates_owner` ON `board_templates` (`owner_id`);--> statement-breakpoint
CREATE TABLE `edit_answers` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`edit_id` text NOT NULL,
	`answer` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`edit_id`) REFERENCES `edits`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `edit_answers_edit_id_unique` ON `edit_answers` (`edit_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `edit_answers_seq` ON `edit_answers` (`install_id`,`seq`);--> statement-breakpoint
CREATE TABLE `edits` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`edit` text NOT NULL,
	`subject` text NOT NULL,
	`words` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `edits_seq` ON `edits` (`install_id`,`seq`);--> statement-breakpoint
ALTER TABLE `rungs` ADD `hidden` integer DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE `values` ADD `hidden` integer DEFAULT false NOT NULL;--> statement-breakpoint
CREATE TRIGGER `edits_no_update` BEFORE UPDATE ON `edits` BEGIN
  SELECT RAISE(ABORT, 'edits: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `edits_no_delete` BEFORE DELETE ON `edits` BEGIN
  SELECT RAISE(ABORT, 'edits: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `edits_no_replace` BEFORE INSERT ON `edits`
WHEN EXISTS (SELECT 1 FROM `edits` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'edits: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `edit_answers_no_update` BEFORE UPDATE ON `edit_answers` BEGIN
  SELECT RAISE(ABORT, 'edit_answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `edit_answers_no_delete` BEFORE DELETE ON `edit_answers` BEGIN
  SELECT RAISE(ABORT, 'edit_answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `edit_answers_no_replace` BEFORE INSERT ON `edit_answers`
WHEN EXISTS (SELECT 1 FROM `edit_answers` WHERE (`id` = NEW.`id`) OR (`edit_id` = NEW.`edit_id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'edit_answers: records are append-only');
END;
