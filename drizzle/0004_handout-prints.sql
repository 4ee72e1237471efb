CREATE TABLE `handout_prints` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_version` int NOT NULL,
	`requested_by` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`course_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`options` json NOT NULL,
	`order_sha256` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`state` enum('queued','ready','failed') NOT NULL DEFAULT 'queued',
	`failure` varchar(300),
	`page_count` int,
	`pages_sha256` char(64) CHARACTER SET ascii COLLATE ascii_bin,
	`pdf_sha256` char(64) CHARACTER SET ascii COLLATE ascii_bin,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `handout_prints_id` PRIMARY KEY(`id`),
	CONSTRAINT `handout_prints_order` UNIQUE(`reading_id`,`reading_version`,`order_sha256`)
);
--> statement-breakpoint
ALTER TABLE `handout_prints` ADD CONSTRAINT `handout_prints_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `handout_prints` ADD CONSTRAINT `handout_prints_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `handout_prints` ADD CONSTRAINT `handout_prints_requested_by_users_id_fk` FOREIGN KEY (`requested_by`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `handout_prints` ADD CONSTRAINT `handout_prints_course_id_courses_id_fk` FOREIGN KEY (`course_id`) REFERENCES `courses`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `handout_prints_department` ON `handout_prints` (`department_id`,`created_at`);