CREATE TABLE `bench_inputs` (
	`install_id` text NOT NULL,
	`sheet` text NOT NULL,
	`inputs` text NOT NULL,
	`by` text NOT NULL,
	`recorded` integer NOT NULL,
	PRIMARY KEY(`install_id`, `sheet`),
	FOREIGN KEY (`install_id`) REFERENCES `installs`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE restrict
);
