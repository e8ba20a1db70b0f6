-- A file is recognised again once somebody has said in which encoding it is.
GRANT UPDATE (recognition) ON section_import TO putlog_web;
