# Seconds that lm() with five predictions of a 24-point series takes, on average over many in one process.
# In: three lines "x ...", "y ..." and "at ..." of numbers on stdin. Out: one number.
lines <- strsplit(readLines(file("stdin")), " ")
numbers <- lapply(lines, function(line) as.numeric(line[-1]))
x <- numbers[[1]]
y <- numbers[[2]]
new <- data.frame(x = numbers[[3]])
once <- function() predict(lm(y ~ x), new, interval = "confidence")
for (i in 1:300) once()
repeats <- 2000
taken <- system.time(for (i in 1:repeats) once())
cat(taken[["user.self"]] / repeats, "\n")
