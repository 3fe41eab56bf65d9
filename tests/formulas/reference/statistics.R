# Makes statistics.json: the same statistics by R and its package sandwich, which share no code with formulas/.
# Run: Rscript tests/formulas/reference/statistics.R > tests/formulas/reference/statistics.json && npx prettier --write tests/formulas/reference/statistics.json
# Frozen with R 4.2.2 and sandwich 3.0-2. Paired trimmed means are written out here from the published equations.
library(sandwich)
options(digits = 17)

number <- function(x) ifelse(is.finite(x), sprintf("%.17g", x), "null")
json <- function(x) {
  if (is.list(x)) {
    body <- vapply(x, json, "")
    if (is.null(names(x))) return(paste0("[", paste(body, collapse = ","), "]"))
    return(paste0("{", paste0("\"", names(x), "\":", body, collapse = ",\n"), "}"))
  }
  if (is.character(x)) return(paste0("\"", x, "\""))
  x <- unname(x)
  if (length(x) == 1 && is.null(attr(x, "list"))) return(number(x))
  paste0("[", paste(number(as.vector(x)), collapse = ","), "]")
}

set.seed(2024)
n <- 48
patient <- rep(1:30, times = c(rep(2, 18), rep(1, 12)))
shared <- rnorm(30, 0, 0.25)[patient]
first <- round(shared + rnorm(n, 0.05, 0.30), 4)
second <- round(first + rt(n, 4) * 0.12 - 0.03, 4)
third <- round(0.7 * first + rnorm(n, 0, 0.22), 4)
x <- round(rnorm(n, 0.4, 0.5), 4)
y <- round(0.3 * x + rnorm(n, -0.1, 0.3), 4)

winsorise <- function(v, tr) {
  s <- sort(v); g <- floor(tr * length(v))
  pmin(pmax(v, s[g + 1]), s[length(v) - g])
}
yuen <- function(a, b, tr) {
  n <- length(a); h <- n - 2 * floor(tr * n)
  wa <- winsorise(a, tr); wb <- winsorise(b, tr)
  se <- sqrt((n - 1) * (var(wa) + var(wb) - 2 * cov(wa, wb)) / (h * (h - 1)))
  d <- mean(a, tr) - mean(b, tr); t <- d / se
  list(difference = d, standardError = se, statistic = t, degreesOfFreedom = h - 1,
       pValue = 2 * pt(-abs(t), h - 1), low = d - qt(.975, h - 1) * se, high = d + qt(.975, h - 1) * se)
}
deviations <- function(a, b) {
  v <- a - b; u <- a + b
  z1 <- (v - mean(v)) / sd(v); z2 <- (u - mean(u)) / sd(u)
  fit <- lm(z2 ~ z1); se <- sqrt(vcovHC(fit, type = "HC4")[2, 2])
  t <- unname(coef(fit)[2]) / se
  list(firstSd = sd(a), secondSd = sd(b), correlation = unname(coef(fit)[2]), statistic = t,
       degreesOfFreedom = length(a) - 2, pValue = 2 * pt(-abs(t), length(a) - 2))
}
# One regressor, the constant: the cluster sandwich with G/(G-1) and nothing else.
fit <- lm(first ~ 1)
clusterSe <- sqrt(vcovCL(fit, cluster = patient, type = "HC0", cadjust = TRUE)[1, 1])
hits <- cbind(abs(first) <= .25, abs(second) <= .25, abs(third) <= .25)
friedman <- friedman.test(hits * 1)
wilson <- function(k, n, level) {
  ci <- suppressWarnings(prop.test(k, n, correct = FALSE, conf.level = level))$conf.int
  list(count = k, total = n, confidence = level, low = ci[1], high = ci[2])
}
mcnemar <- function(b, c) {
  r <- mcnemar.test(matrix(c(10, b, c, 10), 2), correct = TRUE)
  list(onlyFirst = b, onlySecond = c, exactP = binom.test(min(b, c), b + c)$p.value,
       correctedStatistic = unname(r$statistic), correctedP = r$p.value)
}
ellipse <- function(x, y, scale) {
  e <- eigen(cov(cbind(x, y)))
  direction <- atan2(e$vectors[2, 1], e$vectors[1, 1]) * 180 / pi
  list(long = sqrt(e$values[1] * scale), short = sqrt(e$values[2] * scale), direction = direction %% 180)
}
hotelling <- 2 * (n - 1) / (n - 2) * qf(.95, 2, n - 2)
grid <- function(values, f) lapply(values, f)
holm <- c(.012, .04, .0013, .2, .03, .03)

# Three regressors with clusters, as for the Haigis triple.
weights <- round(runif(n, .5, 2), 3)
acd <- round(rnorm(n, 3.1, .4), 3); al <- round(rnorm(n, 23.6, 1.2), 3)
plane <- round(-0.7 + .35 * acd + .2 * al + shared * .1 + rnorm(n, 0, .2), 4)
triple <- lm(plane ~ acd + al, weights = weights)
tripleV <- vcovCL(triple, cluster = patient, type = "HC1", cadjust = TRUE)

cat(json(list(
  made = paste0(R.version.string, "; sandwich ", packageVersion("sandwich")),
  michelson = morley$Speed,
  patient = patient, first = first, second = second, third = third, x = x, y = y,
  describe = list(mean = mean(first), variance = var(first), sd = sd(first), median = median(first),
    meanAbsolute = mean(abs(first)), medianAbsolute = median(abs(first)),
    quantiles = quantile(first, c(0, .025, .1, .25, .5, .75, .9, .975, 1), type = 7)),
  trimmed = list(mean20 = mean(first, .2), mean10 = mean(first, .1), variance20 = var(winsorise(first, .2)),
    covariance20 = cov(winsorise(first, .2), winsorise(second, .2))),
  clustered = list(standardError = clusterSe, low = mean(first) - qt(.975, 29) * clusterSe,
    high = mean(first) + qt(.975, 29) * clusterSe, designEffect = clusterSe^2 / (var(first) / n)),
  yuen = list(plain = yuen(abs(first), abs(second), .2), ten = yuen(first, third, .1), none = yuen(first, third, 0)),
  pairedT = t.test(first, third, paired = TRUE)$p.value,
  deviations = list(firstSecond = deviations(first, second), firstThird = deviations(first, third)),
  holm = list(p = holm, adjusted = p.adjust(holm, "holm")),
  wilson = list(wilson(6, 32, .95), wilson(0, 10, .95), wilson(17, 17, .9), wilson(81, 263, .95), wilson(1, 29, .99)),
  mcnemar = list(mcnemar(86, 150), mcnemar(3, 11), mcnemar(0, 4), mcnemar(25, 26), mcnemar(1200, 1300)),
  cochran = list(statistic = unname(friedman$statistic), pValue = friedman$p.value),
  ellipse = list(eyes = ellipse(x, y, hotelling * (1 + 1 / n)), centroid = ellipse(x, y, hotelling / n)),
  t = grid(list(c(.5, 1), c(2, 3.5), c(-1.3, 7), c(4, 29), c(1.96, 999), c(30, 5), c(-0.001, 12), c(3, 9999)),
    function(a) list(t = a[1], df = a[2], cdf = pt(a[1], a[2]), twoSided = 2 * pt(-abs(a[1]), a[2]))),
  tQuantile = grid(list(c(.975, 1), c(.975, 10), c(.9, 3), c(.005, 47), c(.9995, 2.5), c(.975, 9999), c(.51, 6)),
    function(a) list(share = a[1], df = a[2], value = qt(a[1], a[2]))),
  f = grid(list(c(1, 2, 5), c(3.2, 2, 46), c(.2, 7, 3), c(12, 4, 100), c(.01, 1, 1), c(1.02, 5000, 5000)),
    function(a) list(f = a[1], numerator = a[2], denominator = a[3], upper = pf(a[1], a[2], a[3], lower.tail = FALSE))),
  fQuantile = grid(list(c(.95, 2, 1), c(.95, 2, 46), c(.99, 3, 9), c(.05, 4, 4)),
    function(a) list(share = a[1], numerator = a[2], denominator = a[3], value = qf(a[1], a[2], a[3]))),
  chiSquare = grid(list(c(3.841, 1), c(.3, 1), c(17.36, 1), c(5, 4), c(60, 4), c(480, 500), c(1e-5, 2)),
    function(a) list(chiSquare = a[1], df = a[2], upper = pchisq(a[1], a[2], lower.tail = FALSE))),
  chiSquareQuantile = grid(list(c(.95, 1), c(.95, 2), c(.025, 29), c(.975, 29), c(.5, 400)),
    function(a) list(share = a[1], df = a[2], value = qchisq(a[1], a[2]))),
  normalQuantile = grid(list(1e-10, 1e-4, .025, .3, .5, .7, .975, .9999),
    function(a) list(share = a, value = qnorm(a))),
  logGamma = grid(list(.1, .5, 1, 2.5, 17, 300.5, 5000), function(a) list(x = a, value = lgamma(a))),
  triple = list(weights = weights, acd = acd, al = al, plane = plane,
    acdSlope = unname(coef(triple)[2]), alSlope = unname(coef(triple)[3]),
    acdError = sqrt(tripleV[2, 2]), alError = sqrt(tripleV[3, 3]))
)), "\n")
