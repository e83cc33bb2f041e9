ALTER TABLE `day_level` ADD `channel_path` varchar(300);--> statement-breakpoint
ALTER TABLE `hour_level` ADD `channel_path` varchar(300);--> statement-breakpoint
ALTER TABLE `minute_level` ADD `channel_path` varchar(300);