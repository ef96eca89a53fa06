# Mean by generalised least squares (kriging of the mean) by gstat (Pebesma 2004): best linear unbiased estimate of the
# constant trend and its variance, log(zinc) of the meuse data of R package sp and log10(Ni) of the jura data of gstat.
# Also the difference of the means of the eastern and the western half by Welch's t-test of R.
# Usage: Rscript gstat-means.R > gstat-means.json   (Debian r-cran-gstat)
suppressMessages({library(sp); library(gstat)})

one <- function(x) sprintf("%.17g", as.numeric(x))
script <- sub("^--file=", "", grep("^--file=", commandArgs(), value = TRUE))
sha <- strsplit(system2("sha256sum", script, stdout = TRUE), " ")[[1]][1]
versions <- sprintf("gstat %s, sp %s, %s", packageVersion("gstat"), packageVersion("sp"), R.version.string)

data(meuse); coordinates(meuse) <- ~x+y
data(jura); pred <- jura.pred; coordinates(pred) <- ~Xloc+Yloc

# The mean is the same at every place: any place will do.
mean_of <- function(formula, data, model) {
  place <- SpatialPoints(coordinates(data)[1, , drop = FALSE] + 0.37)
  result <- predict(gstat(NULL, "z", formula, data, model = model), place, BLUE = TRUE, debug.level = 0)
  sprintf("{\"mean\": %s, \"variance\": %s}", one(result$z.pred), one(result$z.var))
}
cat(sprintf(
  "{\n\"provenance\": {\"tool\": \"R gstat\", \"version\": \"%s\", \"script\": \"%s\", \"scriptSha256\": \"%s\"},\n",
  versions, basename(script), sha))
cat(sprintf("\"spherical\": %s,\n", mean_of(log(zinc) ~ 1, meuse, vgm(0.59, "Sph", 897, 0.05))))
cat(sprintf("\"exponential\": %s,\n", mean_of(log(zinc) ~ 1, meuse, vgm(0.7, "Exp", 400, 0.03))))
welch_of <- function(z, x) {
  result <- t.test(z[x > median(x)], z[x <= median(x)])
  sprintf("{\"difference\": %s, \"low\": %s, \"high\": %s}", one(-diff(result$estimate)), one(result$conf.int[1]), one(result$conf.int[2]))
}
cat(sprintf("\"welch\": {\"meuse\": %s, \"jura\": %s},\n",
  welch_of(log(meuse$zinc), coordinates(meuse)[, 1]), welch_of(log10(pred$Ni), coordinates(pred)[, 1])))
cat(sprintf("\"jura\": %s\n}\n", mean_of(log10(Ni) ~ 1, pred, vgm(0.03, "Exp", 0.4, 0.004))))
