// Stands in for a package that finds this out with eval, which the content security policy refuses and reports.
module.exports = () => true
