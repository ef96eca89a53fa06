# Ordinary kriging, cross-validation, experimental variograms and weighted least-squares fits by gstat (Pebesma 2004):
# log(zinc) of the meuse data of R package sp, and log10(Ni) of the jura data of R package gstat (coordinates in km).
# Usage: Rscript gstat-kriging.R > gstat-kriging.json   (Debian r-cran-gstat)
suppressMessages({library(sp); library(gstat)})

# Numbers are written with 17 significant digits, so that nothing is lost on the way.
num <- function(x) paste0("[", paste(sprintf("%.17g", as.numeric(x)), collapse = ","), "]")
obj <- function(...) {
  parts <- list(...)
  paste0("{\n", paste(sprintf("\"%s\": %s", names(parts), unlist(parts)), collapse = ",\n"), "\n}")
}
str <- function(x) sprintf("\"%s\"", x)
one <- function(x) sprintf("%.17g", as.numeric(x))

script <- sub("^--file=", "", grep("^--file=", commandArgs(), value = TRUE))
sha <- strsplit(system2("sha256sum", script, stdout = TRUE), " ")[[1]][1]
versions <- sprintf("gstat %s, sp %s, %s", packageVersion("gstat"), packageVersion("sp"), R.version.string)
provenance <- obj(tool = str("R gstat"), version = str(versions), script = str(basename(script)), scriptSha256 = str(sha))

data(meuse); coordinates(meuse) <- ~x+y
data(meuse.grid); coordinates(meuse.grid) <- ~x+y
formula <- log(zinc) ~ 1

# Places between the samples, and one on a sample, where gstat honours the value exactly.
places <- rbind(coordinates(meuse.grid)[seq(40, 3103, by = 90), ], coordinates(meuse)[7, , drop = FALSE])
at <- SpatialPoints(places)
models <- list(
  spherical = vgm(0.59, "Sph", 897, 0.05),
  exponential = vgm(0.7, "Exp", 400, 0.03),
  sphericalNoNugget = vgm(0.64, "Sph", 800)
)

kriged <- function(result) obj(mean = num(result$var1.pred), variance = num(result$var1.var))
case <- function(model) {
  cv <- krige.cv(formula, meuse, model, verbose = FALSE)
  obj(
    global = kriged(krige(formula, meuse, at, model, debug.level = 0)),
    nearest12 = kriged(krige(formula, meuse, at, model, nmax = 12, debug.level = 0)),
    leaveOneOut = obj(residual = num(cv$residual), variance = num(cv$var1.var))
  )
}
# The same known error variance for every value, filtered out: gstat's model of measurement error.
filtered <- vgm(0.04, "Err", 0, add.to = vgm(0.59, "Sph", 897, 0.02))
off <- SpatialPoints(places[-nrow(places), ])

lags <- function(v) obj(pairs = num(v$np), distance = num(v$dist), gamma = num(v$gamma))
matheron <- variogram(formula, meuse, cutoff = 1500, width = 100)
robust <- variogram(formula, meuse, cutoff = 1500, width = 100, cressie = TRUE)
fit <- function(kind, range) {
  f <- fit.variogram(matheron, vgm(0.6, kind, range, 0.05))
  obj(nugget = one(f$psill[1]), sill = one(f$psill[2]), range = one(f$range[2]), objective = one(attr(f, "SSErr")))
}

# The jura validation places from the 259 samples: from all of them and from the nearest 24.
data(jura)
pred <- jura.pred; coordinates(pred) <- ~Xloc+Yloc
val <- jura.val; coordinates(val) <- ~Xloc+Yloc
nickel <- log10(Ni) ~ 1
juraModel <- vgm(0.03, "Exp", 0.4, 0.004)

meuseResults <- obj(
  data = obj(x = num(coordinates(meuse)[, 1]), y = num(coordinates(meuse)[, 2]), z = num(log(meuse$zinc))),
  places = obj(x = num(places[, 1]), y = num(places[, 2])),
  spherical = case(models$spherical),
  exponential = case(models$exponential),
  sphericalNoNugget = case(models$sphericalNoNugget),
  filtered = kriged(krige(formula, meuse, off, filtered, debug.level = 0)),
  matheron = lags(matheron),
  robust = lags(robust),
  fits = obj(spherical = fit("Sph", 900), exponential = fit("Exp", 400))
)
juraResults <- obj(
  data = obj(x = num(coordinates(pred)[, 1]), y = num(coordinates(pred)[, 2]), z = num(log10(pred$Ni))),
  places = obj(x = num(coordinates(val)[, 1]), y = num(coordinates(val)[, 2])),
  global = kriged(krige(nickel, pred, val, juraModel, debug.level = 0)),
  nearest24 = kriged(krige(nickel, pred, val, juraModel, nmax = 24, debug.level = 0))
)
cat(obj(provenance = provenance, meuse = meuseResults, jura = juraResults), "\n")
