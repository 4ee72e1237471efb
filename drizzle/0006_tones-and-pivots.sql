ALTER TABLE `labels` ADD `tones` json;--> statement-breakpoint
ALTER TABLE `labels` ADD `pivot` boolean DEFAULT false NOT NULL;