ALTER TABLE `assignments` ADD `others_given` boolean DEFAULT true NOT NULL;--> statement-breakpoint
ALTER TABLE `questions` ADD `alternatives` json NOT NULL;