# Writes a table as R's users do: write.csv (comma, decimal point) or write.csv2 (semicolon, decimal comma).
# usage: Rscript write_csv.R csv|csv2 ENCODING IN.tsv OUT.csv
# The first row of IN.tsv are the names; columns of numbers become numbers, all else stays text.
args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 4 || !args[1] %in% c("csv", "csv2")) {
  cat("usage: Rscript write_csv.R csv|csv2 ENCODING IN.tsv OUT.csv\n")
  quit(status = 2)
}
text <- read.delim(args[3], check.names = FALSE, colClasses = "character", encoding = "UTF-8", quote = "")
table <- as.data.frame(lapply(text, function(one) {
  type.convert(one, as.is = TRUE, na.strings = "NA", numerals = "no.loss")
}), check.names = FALSE, optional = TRUE)
names(table) <- names(text)
write <- if (args[1] == "csv") write.csv else write.csv2
write(table, args[4], row.names = FALSE, na = "", fileEncoding = args[2])
