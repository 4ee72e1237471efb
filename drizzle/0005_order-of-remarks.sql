-- One statement: MariaDB takes an AUTO_INCREMENT column only together with its key.
ALTER TABLE `remarks` ADD `written` bigint AUTO_INCREMENT NOT NULL, ADD CONSTRAINT `remarks_written` UNIQUE(`written`);
