CREATE TABLE `questions` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`assignment_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`start_tick` int NOT NULL,
	`points` double,
	CONSTRAINT `questions_id` PRIMARY KEY(`id`),
	CONSTRAINT `questions_span` UNIQUE(`assignment_id`,`start_tick`)
);
--> statement-breakpoint
ALTER TABLE `questions` ADD CONSTRAINT `questions_assignment_id_assignments_id_fk` FOREIGN KEY (`assignment_id`) REFERENCES `assignments`(`id`) ON DELETE cascade ON UPDATE no action;