CREATE TABLE `known_browser` (
	`token_hash` text NOT NULL,
	`person_id` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	PRIMARY KEY(`token_hash`, `person_id`),
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `sign_in_try_last_failure` ON `sign_in_try` (`last_failure_at`);