CREATE TABLE `line_up_import_entry` (
	`id` text PRIMARY KEY NOT NULL,
	`upload_id` text NOT NULL,
	`thing` text NOT NULL,
	`thing_id` text NOT NULL,
	`before` text,
	`mark` integer NOT NULL,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `line_up_import_entry_upload` ON `line_up_import_entry` (`upload_id`);