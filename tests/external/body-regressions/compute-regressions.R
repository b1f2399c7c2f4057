# Regressions of the data set `body` (package gclus): Heinz, Peterson, Johnson, Kerk (2003), J Stat Educ 11(2).
# Writes CSV to standard output: y, n, intercept, height, weight, male, R2, resid_sd, loo_rmse, max_abs_resid and the
# alternative y = int + WH * sqrt(W / H) + male.
suppressMessages(library(gclus))
data(body)
measures <- c("Biiliac", "Bitro", "ChestD", "ChestDp", "Biacrom", "ShoulderG", "ChestG", "WaistG", "AbdG", "HipG")
rows <- lapply(measures, function(y) {
  d <- data.frame(y = body[[y]], H = body$Height, W = body$Weight, male = body$Gender)
  d$root <- sqrt(d$W / d$H)
  fit <- lm(y ~ H + W + male, data = d)
  alt <- lm(y ~ root + male, data = d)
  r <- resid(fit)
  b <- unname(coef(fit))
  a <- unname(coef(alt))
  data.frame(
    y = y, n = nrow(d), intercept = b[1], height = b[2], weight = b[3], male = b[4],
    R2 = summary(fit)$r.squared, resid_sd = summary(fit)$sigma,
    loo_rmse = sqrt(mean((r / (1 - hatvalues(fit)))^2)), max_abs_resid = max(abs(r)),
    alt_sqrt_int = a[1], alt_sqrt_WH = a[2], alt_sqrt_male = a[3],
    alt_sqrt_R2 = summary(alt)$r.squared, alt_sqrt_resid_sd = summary(alt)$sigma
  )
})
options(digits = 15)
write.csv(do.call(rbind, rows), row.names = FALSE)
