/** The test runner keeps a BASE_URL of its own in the environment; the application's is put back before each file. */
if (process.env.QUARTERLINE_TEST_BASE_URL) process.env.BASE_URL = process.env.QUARTERLINE_TEST_BASE_URL;
/** The cheapest hash: tests make many people. */
process.env.PASSWORD_COST ??= "4";
