CREATE TABLE `opening_undisturbed` (
	`id` text PRIMARY KEY NOT NULL,
	`install_id` text NOT NULL,
	`seq` integer NOT NULL,
	`recorded` integer NOT NULL,
	`by` text NOT NULL,
	`as` text NOT NULL,
	`opening_id` text NOT NULL,
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`opening_id`) REFERENCES `openings`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `opening_undisturbed_opening_id_unique` ON `opening_undisturbed` (`opening_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `opening_undisturbed_seq` ON `opening_undisturbed` (`install_id`,`seq`);--> statement-breakpoint
ALTER TABLE `extinguishers` ADD `rating` text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE `extinguishers` ADD `position` text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE `tool_checks` ADD `since` integer;--> statement-breakpoint
ALTER TABLE `tool_checks` ADD `certificate` text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE `tool_checks` ADD `photo` text REFERENCES files(id);--> statement-breakpoint
ALTER TABLE `findings` ADD `more_photos` text DEFAULT '[]' NOT NULL;--> statement-breakpoint
ALTER TABLE `loose_ends` ADD `photos` text DEFAULT '[]' NOT NULL;--> statement-breakpoint
ALTER TABLE `openings` ADD `happened` integer;--> statement-breakpoint
ALTER TABLE `openings` ADD `loose_end` text REFERENCES loose_ends(id);--> statement-breakpoint
ALTER TABLE `openings` ADD `claimed` integer DEFAULT false NOT NULL;--> statement-breakpoint
CREATE TRIGGER `opening_undisturbed_no_update` BEFORE UPDATE ON `opening_undisturbed` BEGIN
  SELECT RAISE(ABORT, 'opening_undisturbed: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_undisturbed_no_delete` BEFORE DELETE ON `opening_undisturbed` BEGIN
  SELECT RAISE(ABORT, 'opening_undisturbed: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_undisturbed_no_replace` BEFORE INSERT ON `opening_undisturbed`
WHEN EXISTS (SELECT 1 FROM `opening_undisturbed` WHERE (`id` = NEW.`id`) OR (`opening_id` = NEW.`opening_id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'opening_undisturbed: records are append-only');
END;
